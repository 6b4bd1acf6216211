package beamwarden.kit;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Placement;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Instrument;
import beamwarden.simulated.DeliveredRecord;
import beamwarden.simulated.FaultPlan;
import beamwarden.simulated.Hardware;
import beamwarden.simulated.MemoryRecord;
import beamwarden.simulated.Mishap;
import beamwarden.simulated.Notes;
import beamwarden.simulated.SimulatedInstrument;
import beamwarden.simulated.Simulation;
import beamwarden.timing.VirtualTime;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Optional;

/** The simulated instrument in this process, on virtual time. */
final class SimulatedInMemoryRig implements Rig {
  private static final double EARLY = 0.1;

  private final VirtualTime line = new VirtualTime(Instant.parse("2031-03-12T19:00:00Z"));
  private final MemoryRecord record = DeliveredRecord.inMemory();
  private final Notes notes = Notes.inMemory();
  private final Abilities abilities;
  private final Path folder;
  private final Hardware hardware;
  private Optional<Mishap> inNextExposure = Optional.empty();
  private SimulatedInstrument instrument;

  SimulatedInMemoryRig(Blanker.Kind blanker, long seed, Path folder) {
    this.abilities = SimulatedLab.abilities(blanker);
    this.folder = folder;
    Simulation simulation = new Simulation(seed, true, true, false, this::strike);
    this.hardware = Hardware.inMemory(abilities, simulation, line, record);
    this.instrument = new SimulatedInstrument(hardware, notes, folder);
  }

  private Optional<FaultPlan.Strike> strike(FaultPlan.Step step, long exposed) {
    if (step != FaultPlan.Step.MID_EXPOSURE) {
      return Optional.empty();
    }
    Optional<Mishap> mishap = inNextExposure;
    inNextExposure = Optional.empty();
    return mishap.map(one -> new FaultPlan.Strike(one, EARLY));
  }

  private Provocation inNextExposure(Mishap mishap) {
    return Provocation.by(() -> inNextExposure = Optional.of(mishap));
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
    return Duration.ofMillis(50);
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
    instrument.die();
    instrument = new SimulatedInstrument(hardware, notes, folder);
  }

  @Override
  public Provocation doorOpens() {
    return Provocation.by(hardware::openDoor);
  }

  @Override
  public Provocation currentRises() {
    return inNextExposure(Mishap.CURRENT_OUT_OF_BOUNDS);
  }

  @Override
  public Provocation connectionBreaks() {
    return inNextExposure(Mishap.LOST_CONNECTION);
  }

  @Override
  public Optional<List<Stretch>> truth() {
    return Optional.of(SimulatedLab.stretches(beat()).of(record.stretches()));
  }

  @Override
  public void close() {
    instrument.close();
  }
}
