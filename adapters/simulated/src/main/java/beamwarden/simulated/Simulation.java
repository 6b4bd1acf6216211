package beamwarden.simulated;

import java.util.Map;
import java.util.Set;
import java.util.TreeSet;

/**
 * How the instrument is simulated.
 *
 * @param seed from which all chance comes
 * @param noise whether there is any chance at all: without it times, currents and counts are the
 *     expected ones, the scan and the stage are exact, and no data is written
 * @param data whether data files are written
 * @param onDisk whether notes, hardware and record outlive the process
 * @param faults what goes wrong
 */
public record Simulation(long seed, boolean noise, boolean data, boolean onDisk, FaultPlan faults) {
  private static final Set<String> OPTIONS = Set.of("seed", "noise", "data", "notes", "faults");

  /** A simulation in memory, without faults and data. */
  public static Simulation inMemory(long seed) {
    return new Simulation(seed, true, false, false, FaultPlan.NONE);
  }

  /** The same without chance. */
  public Simulation withoutNoise() {
    return new Simulation(seed, false, data, onDisk, faults);
  }

  /** The same with faults. */
  public Simulation with(FaultPlan plan) {
    return new Simulation(seed, noise, data, onDisk, plan);
  }

  /**
   * From options: {@code seed} (a whole number, 1), {@code noise} (on or off, on), {@code data} (on
   * or off, on unless the notes are kept in memory), {@code notes} (disk or memory, disk) and
   * {@code faults} (a script, none).
   *
   * @throws IllegalArgumentException when one is unknown or cannot be read
   */
  static Simulation of(Map<String, String> options) {
    Set<String> unknown = new TreeSet<>(options.keySet());
    unknown.removeAll(OPTIONS);
    if (!unknown.isEmpty()) {
      throw new IllegalArgumentException(
          "the simulated instrument has no option '"
              + unknown.iterator().next()
              + "': it knows "
              + String.join(", ", new TreeSet<>(OPTIONS)));
    }
    boolean onDisk = choice(options, "notes", "disk", "memory", true);
    return new Simulation(
        seed(options.getOrDefault("seed", "1")),
        choice(options, "noise", "on", "off", true),
        choice(options, "data", "on", "off", onDisk),
        onDisk,
        new ScriptedFaults(options.getOrDefault("faults", "")));
  }

  /** Whether data files are written after all. */
  boolean writesData() {
    return data && noise;
  }

  private static long seed(String text) {
    try {
      return Long.parseLong(text.strip());
    } catch (NumberFormatException notWhole) {
      throw new IllegalArgumentException(
          "the option seed must be a whole number, not '" + text + "'", notWhole);
    }
  }

  private static boolean choice(
      Map<String, String> options, String name, String yes, String no, boolean otherwise) {
    String text = options.getOrDefault(name, otherwise ? yes : no);
    if (!text.equals(yes) && !text.equals(no)) {
      throw new IllegalArgumentException(
          "the option " + name + " must be " + yes + " or " + no + ", not '" + text + "'");
    }
    return text.equals(yes);
  }
}
