package beamwarden.simulated;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Point;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Probe;
import beamwarden.quantity.Current;
import java.time.Duration;
import java.util.SplittableRandom;

/**
 * How far this one instrument is off, seeded, and always strictly inside what its profile
 * guarantees. Without noise it is off in nothing.
 */
final class Imperfection {
  private static final double INSIDE = 0.98;

  private final Abilities abilities;
  private final Simulation simulation;

  Imperfection(Abilities abilities, Simulation simulation) {
    this.abilities = abilities;
    this.simulation = simulation;
  }

  /** By how much too long a scanned length is; 1 when it is right. */
  double gain(String axis) {
    return 1 + within(abilities.field().calibration(), Seeds.random(seed(), "gain", axis));
  }

  /** How far from its target a move of the stage ends. */
  Point stageError(long move) {
    SplittableRandom random = Seeds.random(seed(), "stage", move);
    double distance =
        INSIDE * abilities.stage().repeatabilityMetres() * Math.sqrt(random.nextDouble());
    double angle = 2 * Math.PI * random.nextDouble();
    return simulation.noise() && move > 0
        ? new Point(distance * Math.cos(angle), distance * Math.sin(angle))
        : new Point(0, 0);
  }

  /** The current that truly flows at a setting of the column. */
  TrueCurrent current(Current wished, long setting, TrueCurrent.Surge surge) {
    double drift = simulation.noise() ? abilities.meter().drift() : 0;
    return new TrueCurrent(wished, drift, Seeds.random(seed(), "current", setting), surge);
  }

  /**
   * What the cup's meter shows. With an error of e in parts and d besides, the truth T lies within
   * tolerance times the reading, and the floor, of the reading, as long as e is at most
   * tolerance/(1+tolerance) and d at most half the floor.
   */
  Current reading(double amperes, long occasion) {
    CurrentMeter meter = abilities.meter();
    SplittableRandom random = Seeds.random(seed(), "meter", occasion);
    double part = within(meter.tolerance() / (1 + meter.tolerance()), random);
    return new Current(amperes * (1 + part) + within(meter.floor().amperes() / 2, random));
  }

  /**
   * By how much the monitor errs during an exposure, outwards: it was set against the cup, so that
   * its readings stay well inside the tolerance and the drift.
   */
  double monitorError(long grant) {
    double most = Math.min(abilities.meter().tolerance(), abilities.meter().drift()) / 2;
    return Math.abs(within(most, Seeds.random(seed(), "monitor", grant)));
  }

  /** How long the blanker takes, of the time that is guaranteed. */
  Duration blankingTakes(long grant) {
    Duration most = abilities.blanker().alone().orElse(Duration.ZERO);
    double share = Math.abs(within(1, Seeds.random(seed(), "blanker", grant)));
    return Duration.ofNanos((long) (most.toNanos() * share));
  }

  /**
   * The probe's diameter: as it was measured at these very settings, else the largest that was ever
   * measured; 0 when none was.
   */
  double probeMetres(BeamSettings beam) {
    return abilities.probes().stream()
        .filter(one -> one.voltage().equals(beam.voltage()) && one.current().equals(beam.current()))
        .findFirst()
        .map(Probe::diameter)
        .or(() -> abilities.probes().stream().map(Probe::diameter).max((a, b) -> a.compareTo(b)))
        .map(diameter -> diameter.metres())
        .orElse(0.0);
  }

  private double within(double most, SplittableRandom random) {
    return simulation.noise() ? INSIDE * most * (2 * random.nextDouble() - 1) : 0;
  }

  private long seed() {
    return simulation.seed();
  }
}
