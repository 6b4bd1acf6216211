package beamwarden.simulated;

import beamwarden.instrument.AdapterProvider;
import beamwarden.instrument.Instrument;
import beamwarden.timing.Timeline;
import beamwarden.timing.VirtualTime;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;

/** Makes the simulated instrument; {@code simulated} in instrument profiles. */
public final class SimulatedProvider implements AdapterProvider {
  private static final int DIED = 137;

  /** For {@link java.util.ServiceLoader}. */
  public SimulatedProvider() {}

  @Override
  public String name() {
    return "simulated";
  }

  /**
   * Opens it with its options: {@code seed} (1), {@code noise} (on, off), {@code data} (on, off),
   * {@code notes} (disk, memory) and {@code faults} (a script).
   *
   * <p>With notes on disk its folder holds the record {@code delivered.jsonl}, the adapter's notes,
   * what the hardware remembers, and the data. A process that is scripted to die does so, unless
   * time is virtual: then only the adapter ends.
   *
   * @throws IllegalArgumentException when an option is unknown or cannot be read
   */
  @Override
  public Instrument open(Setting setting, Timeline time) {
    Simulation simulation = Simulation.of(setting.options());
    if (!simulation.onDisk()) {
      Hardware hardware =
          Hardware.inMemory(setting.abilities(), simulation, time, DeliveredRecord.inMemory());
      return opened(setting, simulation, time, hardware, Notes.inMemory());
    }
    Path folder = setting.folder();
    DurableFile memory = new DurableFile(folder.resolve("hardware.notes"));
    Hardware hardware =
        new Hardware(
            setting.abilities(),
            simulation,
            time,
            DeliveredRecord.in(folder.resolve("delivered.jsonl")),
            HardwareState.remembered(memory.lines()),
            state -> memory.replaceQuickly(List.of(state.line())));
    return opened(setting, simulation, time, hardware, Notes.in(folder.resolve("adapter.notes")));
  }

  private static Instrument opened(
      Setting setting, Simulation simulation, Timeline time, Hardware hardware, Notes notes) {
    Optional<DataFolder> data =
        simulation.writesData()
            ? Optional.of(new DataFolder(setting.folder().resolve("data"), time))
            : Optional.empty();
    return new SimulatedInstrument(hardware, notes, data, death(time));
  }

  private static Runnable death(Timeline time) {
    return time instanceof VirtualTime ? () -> {} : () -> Runtime.getRuntime().halt(DIED);
  }
}
