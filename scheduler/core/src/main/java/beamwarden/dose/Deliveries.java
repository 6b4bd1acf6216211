package beamwarden.dose;

import beamwarden.beam.Exposure;
import beamwarden.beam.Scan;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.Receipt;
import beamwarden.quantity.Current;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** What exposures give a sample: as granted, as received, and for a whole job as planned. */
public final class Deliveries {
  /** How much shorter than its whole units a beam-on time may be before it is not believed. */
  static final double SHORTER_BELIEVED = 0.01;

  private Deliveries() {}

  /**
   * What a grant may give in full.
   *
   * <p>The beam is on in the pixels of the granted lines, in flyback too when nothing blanks it
   * there, and then for the time that the blanker takes by itself. In a raster the scan goes on
   * meanwhile and never leaves the granted lines: that time counts as charge, and evenly in the
   * fluence of the lines.
   *
   * @param read the last reading of the current at these settings
   * @throws IllegalArgumentException when the instrument has no blanker: a parked beam is not
   *     counted yet
   */
  public static Delivery planned(
      Exposure exposure, Abilities abilities, Current read, long grant, long stay) {
    if (abilities.blanker().kind() == Blanker.Kind.NONE) {
      throw new IllegalArgumentException(
          "the instrument "
              + abilities.instrument()
              + " has no blanker, and what a parked beam gives a sample cannot be counted yet");
    }
    Tolerances tolerances = Tolerances.of(abilities, exposure);
    Current wished = exposure.conditions().beam().current();
    Scan scan = exposure.scan();
    Duration beamOn = tolerances.blanksFlyback() ? scan.beamOn() : scan.duration();
    return new Delivery(
        grant,
        stay,
        exposure,
        scan.units(),
        beamOn,
        beamOn.plus(tolerances.blanking()),
        read,
        abilities.meter().highest(wished, read),
        tolerances);
  }

  /**
   * All exposures of a job that are not done, as planned: the current as last read, one stay for
   * each tile or point. Grants and stays have numbers below zero.
   */
  public static List<Delivery> whole(
      Job job, Sample sample, Abilities abilities, Current read, Done done, Optional<Trim> limit) {
    List<Delivery> planned = new ArrayList<>();
    Done reached = done;
    while (true) {
      Optional<Exposure> next = Exposures.next(job, sample, abilities, reached, limit);
      if (next.isEmpty()) {
        return planned;
      }
      int pass = next.get().pass();
      long stay = -1L - Exposures.pass(job, pass, abilities).place();
      planned.add(planned(next.get(), abilities, read, -1L - planned.size(), stay));
      reached = reached.plus(pass, next.get().scan().units());
    }
  }

  /**
   * What a receipt says was given under a grant.
   *
   * <p>The highest current stays what the grant counted on: the guarantees allow it between
   * readings. The beam-on time is the receipt's, but no less than its whole units take.
   *
   * @param inFull what the grant may give in full
   * @param receipt the receipt, of the same grant
   * @param meter how far off its readings may be
   */
  public static Receiving received(Delivery inFull, Receipt receipt, CurrentMeter meter) {
    Optional<String> contradiction = contradiction(inFull, receipt);
    if (contradiction.isPresent()) {
      return new Receiving.Contradicts(contradiction.get(), atMost(inFull, receipt, meter));
    }
    Duration least = beamOn(inFull, receipt.unitsDone());
    Duration beamOn = longer(receipt.beamOn(), least);
    return new Receiving.Believed(
        as(
            inFull,
            receipt.unitsTouched(),
            beamOn,
            beamOn,
            best(inFull, receipt),
            inFull.upperCurrent()));
  }

  private static Optional<String> contradiction(Delivery inFull, Receipt receipt) {
    long granted = inFull.exposure().scan().units();
    Duration least = beamOn(inFull, receipt.unitsDone());
    Current highest = highestSeen(receipt);
    if (receipt.unitsTouched() > granted) {
      return said(receipt, receipt.unitsTouched() + " units touched, and " + granted + " granted");
    }
    if (receipt.beamOn().compareTo(inFull.upperBeamOn()) > 0) {
      return said(receipt, receipt.beamOn() + " of beam, and " + inFull.upperBeamOn() + " granted");
    }
    if (receipt.unitsTouched() == 0 && !receipt.beamOn().isZero()) {
      return said(receipt, receipt.beamOn() + " of beam, and no unit touched");
    }
    if (receipt.beamOn().toNanos() < least.toNanos() * (1 - SHORTER_BELIEVED)) {
      String units = receipt.unitsDone() + " units done, which take " + least;
      return said(receipt, receipt.beamOn() + " of beam, and " + units);
    }
    if (highest.compareTo(inFull.upperCurrent()) > 0) {
      return said(receipt, highest + " seen, and at most " + inFull.upperCurrent() + " granted");
    }
    return Optional.empty();
  }

  private static Optional<String> said(Receipt receipt, String contradiction) {
    return Optional.of("the receipt of grant " + receipt.grant() + " says " + contradiction);
  }

  /** The higher of grant and receipt in everything. */
  private static Delivery atMost(Delivery inFull, Receipt receipt, CurrentMeter meter) {
    Current seen = highestSeen(receipt);
    Current truly = new Current(seen.amperes() * (1 + meter.tolerance()) + meter.floor().amperes());
    Current upper = seen.amperes() == 0 ? inFull.upperCurrent() : inFull.upperCurrent().max(truly);
    return as(
        inFull,
        inFull.unitsTouched(),
        longer(inFull.bestBeamOn(), receipt.beamOn()),
        longer(inFull.upperBeamOn(), receipt.beamOn()),
        inFull.bestCurrent().max(seen),
        upper);
  }

  private static Delivery as(
      Delivery inFull,
      long touched,
      Duration bestBeamOn,
      Duration upperBeamOn,
      Current bestCurrent,
      Current upperCurrent) {
    return new Delivery(
        inFull.grant(),
        inFull.stay(),
        inFull.exposure(),
        touched,
        bestBeamOn,
        upperBeamOn,
        bestCurrent,
        upperCurrent,
        inFull.tolerances());
  }

  private static Current highestSeen(Receipt receipt) {
    return receipt.highestCurrent().map(CurrentReading::current).orElse(new Current(0));
  }

  /** Half-way between the lowest and the highest current seen, or what the grant counted on. */
  private static Current best(Delivery inFull, Receipt receipt) {
    if (receipt.lowestCurrent().isEmpty() || receipt.highestCurrent().isEmpty()) {
      return inFull.bestCurrent();
    }
    double sum =
        receipt.lowestCurrent().get().current().amperes()
            + receipt.highestCurrent().get().current().amperes();
    return new Current(sum / 2);
  }

  /** How long the beam is on for some whole units of a grant. */
  private static Duration beamOn(Delivery inFull, long units) {
    Scan scan = inFull.exposure().scan();
    return units == 0 ? Duration.ZERO : scan.beamOn().dividedBy(scan.units()).multipliedBy(units);
  }

  private static Duration longer(Duration one, Duration other) {
    return one.compareTo(other) >= 0 ? one : other;
  }
}
