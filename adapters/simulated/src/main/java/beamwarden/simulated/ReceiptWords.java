package beamwarden.simulated;

import beamwarden.beam.BeamSettings;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Receipt;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import java.time.Duration;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** A receipt as words of a durable note, and back, without losing a bit. */
final class ReceiptWords {
  private ReceiptWords() {}

  static List<Object> of(Receipt receipt) {
    List<Object> words =
        new ArrayList<>(
            List.of(
                receipt.grant(),
                receipt.fence(),
                receipt.unitsDone(),
                receipt.unitsTouched(),
                receipt.beamOn().toNanos()));
    add(words, receipt.lowestCurrent());
    add(words, receipt.highestCurrent());
    words.add(receipt.counts().size());
    receipt.counts().forEach((name, count) -> words.addAll(List.of(name, count)));
    words.add(receipt.files().size());
    for (DataFile file : receipt.files()) {
      words.addAll(List.of(file.path(), file.type(), file.bytes(), file.sha256()));
    }
    words.add(receipt.fault().isPresent());
    receipt.fault().ifPresent(fault -> words.addAll(List.of(fault.kind(), fault.message())));
    return words;
  }

  static Receipt read(Words words) {
    return new Receipt(
        words.whole(),
        words.whole(),
        words.whole(),
        words.whole(),
        Duration.ofNanos(words.whole()),
        reading(words),
        reading(words),
        counts(words),
        files(words),
        fault(words));
  }

  private static void add(List<Object> words, Optional<CurrentReading> reading) {
    words.add(reading.isPresent());
    reading.ifPresent(
        shown ->
            words.addAll(
                List.of(
                    shown.settings().voltage().volts(),
                    shown.settings().current().amperes(),
                    shown.current().amperes())));
  }

  private static Optional<CurrentReading> reading(Words words) {
    if (!words.yes()) {
      return Optional.empty();
    }
    BeamSettings settings =
        new BeamSettings(new Voltage(words.number()), new Current(words.number()));
    return Optional.of(new CurrentReading(settings, new Current(words.number())));
  }

  private static Map<String, Long> counts(Words words) {
    Map<String, Long> counts = new HashMap<>();
    for (long left = words.whole(); left > 0; left--) {
      counts.put(words.text(), words.whole());
    }
    return counts;
  }

  private static List<DataFile> files(Words words) {
    List<DataFile> files = new ArrayList<>();
    for (long left = words.whole(); left > 0; left--) {
      files.add(new DataFile(words.text(), words.text(), words.whole(), words.text()));
    }
    return files;
  }

  private static Optional<Fault> fault(Words words) {
    return words.yes()
        ? Optional.of(new Fault(FaultKind.valueOf(words.text()), words.text()))
        : Optional.empty();
  }
}
