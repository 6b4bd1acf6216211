package beamwarden.report;

import beamwarden.quantity.Charge;
import beamwarden.quantity.Fluence;
import beamwarden.shift.Shift;
import java.math.BigDecimal;
import java.math.MathContext;
import java.time.Duration;
import java.time.Instant;
import java.time.ZoneId;
import java.time.format.DateTimeFormatter;
import java.util.Locale;
import java.util.Optional;

/** How times and figures are said to people. */
final class Texts {
  private static final DateTimeFormatter TIME = DateTimeFormatter.ofPattern("HH:mm", Locale.ROOT);
  private static final DateTimeFormatter DAY =
      DateTimeFormatter.ofPattern("MM-dd HH:mm", Locale.ROOT);
  private static final DateTimeFormatter MOMENT =
      DateTimeFormatter.ofPattern("yyyy-MM-dd HH:mm", Locale.ROOT);
  private static final double LARGEST_PLAIN = 1e7;
  private static final MathContext FOUR_DIGITS = new MathContext(4);
  private static final int SECONDS_OF_MINUTE = 60;
  private static final int KILO = 1000;
  private static final int PERCENT = 100;

  private Texts() {}

  /** A moment by the lab's clock: {@code 19:04}. */
  static String time(Instant moment, ZoneId zone) {
    return TIME.format(moment.atZone(zone));
  }

  /** The same, or a dash. */
  static String time(Optional<Instant> moment, ZoneId zone) {
    return moment.map(known -> time(known, zone)).orElse("-");
  }

  /** A moment by the lab's clock, with its date: {@code 2031-03-12 19:04}. */
  static String moment(Instant moment, ZoneId zone) {
    return MOMENT.format(moment.atZone(zone));
  }

  /** A moment by the lab's clock, with its day: {@code 03-12 19:04}. */
  static String day(Instant moment, ZoneId zone) {
    return DAY.format(moment.atZone(zone));
  }

  /** A shift by the lab's clock: {@code 19:00 to 07:00, unattended}. */
  static String shift(Shift shift, ZoneId zone) {
    return time(shift.opens(), zone)
        + " to "
        + time(shift.closes(), zone)
        + (shift.unattended() ? ", unattended" : ", attended");
  }

  /** A duration: {@code 3 h 12 min}, {@code 4 min 30 s}, {@code 12 s}. */
  static String duration(Duration time) {
    long seconds = Math.round(time.toMillis() / 1000.0);
    long minutes = seconds / SECONDS_OF_MINUTE;
    long hours = minutes / SECONDS_OF_MINUTE;
    if (hours > 0) {
      return hours + " h " + minutes % SECONDS_OF_MINUTE + " min";
    }
    return minutes > 0 ? minutes + " min " + seconds % SECONDS_OF_MINUTE + " s" : seconds + " s";
  }

  /** A part of a whole in percent, 100 only when it is whole. */
  static String percent(double part) {
    long whole = part < 1 ? Math.min(PERCENT - 1, Math.round(part * PERCENT)) : PERCENT;
    return whole + " %";
  }

  /** A fluence, or a dash. */
  static String fluence(Optional<Fluence> fluence) {
    return fluence.map(known -> value(known.electronsPerSquareNanometre(), "e/nm2")).orElse("-");
  }

  /** A value of a cap in its unit. */
  static String value(double value, String unit) {
    return unit.equals("C") ? new Charge(value).toString() : figure(value) + " " + unit;
  }

  private static String figure(double value) {
    if (Math.abs(value) >= LARGEST_PLAIN) {
      return String.format(Locale.ROOT, "%.3e", value);
    }
    BigDecimal rounded = new BigDecimal(value).round(FOUR_DIGITS).stripTrailingZeros();
    return value == 0 ? "0" : rounded.toPlainString();
  }

  /** A size in bytes. */
  static String bytes(long bytes) {
    if (bytes < KILO) {
      return bytes + " B";
    }
    double scaled = bytes;
    int thousands = 0;
    while (scaled >= KILO && thousands < 4) {
      scaled /= KILO;
      thousands++;
    }
    return String.format(Locale.ROOT, "%.3g %sB", scaled, " kMGT".charAt(thousands));
  }
}
