package beamwarden.kit;

import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mode;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.ModeAbility.Boundary;
import java.time.Duration;
import java.util.List;
import java.util.Optional;

/** The exposures that the suite asks for, cut to what the instrument offers. */
final class Exposures {
  /** Beats in one line of a raster. */
  static final int LINE_BEATS = 4;

  /** Lines of a long raster. */
  static final int LONG_LINES = 10;

  private static final int LEAST_COLUMNS = 16;
  private static final List<Mode> RASTERS =
      List.of(Mode.INTENSITY_MAP, Mode.ELECTRON_IMAGE, Mode.SPECTRAL_MAP);
  private static final List<Mode> SPOTS = List.of(Mode.PHOTON_CORRELATION, Mode.DECAY_TRACE);

  private final Rig rig;

  Exposures(Rig rig) {
    this.rig = rig;
  }

  /** Ten lines. */
  Exposure longOne() {
    return ofLines(LONG_LINES);
  }

  /** Two lines. */
  Exposure shortOne() {
    return ofLines(2);
  }

  /** Some lines of four beats each; else a spot of as long. */
  Exposure ofLines(int lines) {
    return raster(lines).or(() -> spot(LINE_BEATS * lines)).orElseThrow(Exposures::none);
  }

  /** Some lines that may end after each of them, where the instrument has such a mode. */
  Optional<Exposure> raster(int lines) {
    return offered(RASTERS)
        .filter(mode -> ability(mode).stopsAt() == Boundary.LINE)
        .map(mode -> exposure(mode, lines(ability(mode), lines)));
  }

  /** A rest at the middle of the ground, at most as long as the mode allows. */
  Optional<Exposure> spot(int beats) {
    return offered(SPOTS).map(mode -> exposure(mode, spot(ability(mode), beats)));
  }

  /** The wait between a grant's start and its first electron, by the abilities. */
  Duration lead(Exposure exposure) {
    return ability(exposure.conditions().mode()).frameStart();
  }

  private Scan lines(ModeAbility ability, int lines) {
    Duration line = rig.beat().multipliedBy(LINE_BEATS);
    Duration dwell = within(ability, line.dividedBy(LEAST_COLUMNS));
    int columns = (int) Math.max(1, line.toNanos() / dwell.toNanos());
    return new RasterScan(rig.ground(), columns, lines, 0, lines, dwell, ability.flyback());
  }

  private Scan spot(ModeAbility ability, int beats) {
    return new SpotScan(rig.ground().centre(), within(ability, rig.beat().multipliedBy(beats)));
  }

  private static Duration within(ModeAbility ability, Duration wish) {
    Duration atLeast = wish.compareTo(ability.shortestDwell()) < 0 ? ability.shortestDwell() : wish;
    return atLeast.compareTo(ability.longestDwell()) > 0 ? ability.longestDwell() : atLeast;
  }

  private Exposure exposure(Mode mode, Scan scan) {
    Conditions conditions = new Conditions(rig.settings(), mode, Conditions.PANCHROMATIC);
    return new Exposure("promises", 0, "spent-ground", rig.placement(), conditions, scan);
  }

  private Optional<Mode> offered(List<Mode> modes) {
    return modes.stream().filter(rig.abilities().modes()::containsKey).findFirst();
  }

  private ModeAbility ability(Mode mode) {
    return rig.abilities().modes().get(mode);
  }

  private static IllegalStateException none() {
    return new IllegalStateException(
        "the instrument offers neither a raster that stops at lines ("
            + RASTERS
            + ") nor a rest at a point ("
            + SPOTS
            + "): the suite has nothing to expose");
  }
}
