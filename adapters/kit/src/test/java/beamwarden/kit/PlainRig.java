package beamwarden.kit;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Field;
import beamwarden.instrument.Grant;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.ModeAbility.Boundary;
import beamwarden.instrument.Stage;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.timing.VirtualTime;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;

/** A rig around a plain instrument, or around one that does something badly. */
final class PlainRig implements Rig {
  private static final BeamSettings SETTINGS =
      new BeamSettings(new Voltage(8000), new Current(350e-12));

  private final Function<PlainRig, PlainInstrument> make;
  private final VirtualTime line = new VirtualTime(Instant.parse("2031-03-12T19:00:00Z"));
  private final PlainHardware hardware = new PlainHardware(line);
  private final PlainNotes notes = new PlainNotes();
  private final Path folder;
  private PlainInstrument instrument;

  PlainRig(Function<PlainRig, PlainInstrument> make, Path folder) {
    this.make = make;
    this.folder = folder;
    this.instrument = make.apply(this);
  }

  VirtualTime line() {
    return line;
  }

  PlainHardware hardware() {
    return hardware;
  }

  PlainNotes notes() {
    return notes;
  }

  @Override
  public Instrument instrument() {
    return instrument;
  }

  @Override
  public Abilities abilities() {
    return ABILITIES;
  }

  @Override
  public Passage time() {
    return Passage.of(line);
  }

  @Override
  public Duration beat() {
    return Duration.ofMillis(50);
  }

  @Override
  public BeamSettings settings() {
    return SETTINGS;
  }

  @Override
  public Placement placement() {
    return new Placement(new Point(12.4e-3, -3.1e-3), 12, 3e-6);
  }

  @Override
  public void restart() {
    instrument.die();
    instrument = make.apply(this);
  }

  @Override
  public Provocation doorOpens() {
    return Provocation.by(hardware::openDoor);
  }

  @Override
  public Provocation currentRises() {
    return Provocation.by(() -> hardware.inNextExposure(hardware::raiseCurrent));
  }

  @Override
  public Provocation connectionBreaks() {
    return Provocation.by(() -> hardware.inNextExposure(instrument::cut));
  }

  @Override
  public Optional<List<Stretch>> truth() {
    return Optional.of(hardware.delivered());
  }

  @Override
  public void close() {
    instrument.close();
  }

  /** Writes a grant's data and forces it to disk. */
  DataFile write(Grant grant) {
    byte[] content = ("counts of grant " + grant.number()).getBytes(StandardCharsets.UTF_8);
    Path path = folder.resolve(grant.number() + ".txt");
    try {
      Files.write(
          path,
          content,
          StandardOpenOption.CREATE,
          StandardOpenOption.WRITE,
          StandardOpenOption.SYNC);
    } catch (IOException e) {
      throw new UncheckedIOException("cannot write " + path, e);
    }
    return new DataFile(
        path.toString(), "text/plain", content.length, ReceiptPromises.sha256(content));
  }

  private static final Abilities ABILITIES =
      new Abilities(
          "plain",
          new Stage(-25e-3, 25e-3, -25e-3, 25e-3, 1e-3, 10e-3, Duration.ZERO, 2e-6),
          new Field(0.5e-3, 0.02),
          new Column(
              new Voltage(1000),
              new Voltage(30000),
              Duration.ZERO,
              new Current(2e-12),
              new Current(40e-9),
              Duration.ZERO),
          new CurrentMeter(0.03, new Current(0.2e-12), 0.1, Duration.ofHours(1), Duration.ZERO),
          new Blanker(Blanker.Kind.FAST, Optional.of(Duration.ofNanos(100_000))),
          Map.of(),
          Duration.ZERO,
          Map.of(
              Mode.INTENSITY_MAP,
              mode(Boundary.LINE),
              Mode.PHOTON_CORRELATION,
              mode(Boundary.SLICE)),
          List.of());

  private static ModeAbility mode(Boundary boundary) {
    return new ModeAbility(
        Duration.ofNanos(200),
        Duration.ofSeconds(30),
        OptionalDouble.empty(),
        Duration.ZERO,
        Duration.ZERO,
        boundary);
  }
}
