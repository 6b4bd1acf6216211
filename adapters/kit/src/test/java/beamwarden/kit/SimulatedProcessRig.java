package beamwarden.kit;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Placement;
import beamwarden.bridge.BridgeInstrument;
import beamwarden.bridge.HostProcess;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.simulated.Mishap;
import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.TimeUnit;
import tools.jackson.databind.json.JsonMapper;

/** The simulated instrument as a process of its own behind the bridge, faster than real time. */
final class SimulatedProcessRig implements Rig {
  private static final double PACE = 6;
  private static final Instant EVENING = Instant.parse("2031-03-12T19:00:00Z");

  /** More than the process takes to start. */
  private static final Duration START = Duration.ofSeconds(50);

  private static final long EXIT_SECONDS = 10;

  private final Abilities abilities = SimulatedLab.abilities(Blanker.Kind.FAST);
  private final Path folder;
  private final TimeAnchor anchor;
  private final PacedTime line;
  private String faults = "";
  private BridgeInstrument instrument;

  /** A rig whose line of time begins now, by the wall clock. */
  SimulatedProcessRig(Path folder, Instant now) {
    this.folder = folder;
    this.anchor = new TimeAnchor(EVENING, now, PACE);
    this.line = new PacedTime(anchor, "kit-line");
    this.instrument = bridge();
  }

  private BridgeInstrument bridge() {
    Map<String, String> options = Map.of("seed", "7", "faults", faults);
    return new BridgeInstrument(
        HostProcess.ofAdapter("simulated", folder, abilities, options, anchor));
  }

  @Override
  public Instrument instrument() {
    return instrument;
  }

  @Override
  public Abilities abilities() {
    return abilities;
  }

  @Override
  public Passage time() {
    return Passage.of(line);
  }

  @Override
  public Duration beat() {
    return Duration.ofMillis(250);
  }

  @Override
  public Duration patience() {
    return Duration.ofMinutes(5);
  }

  @Override
  public BeamSettings settings() {
    return SimulatedLab.SETTINGS;
  }

  @Override
  public Placement placement() {
    return SimulatedLab.PLACEMENT;
  }

  @Override
  public void restart() {
    process().ifPresent(process -> ended(process, process.destroyForcibly()));
    instrument.close();
    instrument = bridge();
  }

  @Override
  public void endInOrder() {
    process().ifPresent(process -> ended(process, process.destroy()));
  }

  /** By a script at the next start, because the door's moment has to be told beforehand. */
  @Override
  public Provocation doorOpens() {
    return Provocation.by(
        () -> {
          Duration age = Duration.between(EVENING, line.instant());
          faults = Mishap.DOOR_OPENED.text() + "@time:" + age.plus(START).toSeconds() + "s";
          restart();
          Recorder heard = new Recorder(time());
          instrument.connect(heard);
          heard.await(0, InstrumentEvent.Trouble.class, trouble -> true, patience());
          faults = "";
        });
  }

  @Override
  public Provocation currentRises() {
    return inNextExposure(Mishap.CURRENT_OUT_OF_BOUNDS);
  }

  @Override
  public Provocation connectionBreaks() {
    return inNextExposure(Mishap.LOST_CONNECTION);
  }

  private Provocation inNextExposure(Mishap mishap) {
    return Provocation.by(() -> faults = mishap.text() + "@grant:" + (exposed() + 1));
  }

  private long exposed() {
    return stretches().stream().map(Stretch::grant).distinct().count();
  }

  @Override
  public Optional<List<Stretch>> truth() {
    return Optional.of(stretches());
  }

  private List<Stretch> stretches() {
    return SimulatedLab.stretches(beat()).in(folder.resolve("delivered.jsonl"));
  }

  @Override
  public void close() {
    process().ifPresent(process -> ended(process, process.destroyForcibly()));
    instrument.close();
    line.close();
  }

  /** The adapter's process, by the address that it has left in its folder. */
  private Optional<ProcessHandle> process() {
    Path address = folder.resolve("address");
    if (!Files.exists(address)) {
      return Optional.empty();
    }
    try {
      long pid = new JsonMapper().readTree(Files.readAllBytes(address)).get("pid").longValue();
      return ProcessHandle.of(pid);
    } catch (IOException e) {
      throw new UncheckedIOException("cannot read " + address, e);
    }
  }

  private static void ended(ProcessHandle process, boolean asked) {
    CompletableFuture<ProcessHandle> exit = process.onExit();
    if (!asked || exit.completeOnTimeout(null, EXIT_SECONDS, TimeUnit.SECONDS).join() == null) {
      throw new IllegalStateException("the adapter's process " + process.pid() + " does not end");
    }
  }
}
