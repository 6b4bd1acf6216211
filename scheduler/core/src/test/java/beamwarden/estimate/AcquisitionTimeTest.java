package beamwarden.estimate;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Mode;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.dose.Exposures;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Field;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Stage;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.AtCap;
import beamwarden.queue.Job;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvFileSource;

/** Times of acquisitions against worked values; the source stands in the data file. */
class AcquisitionTimeTest {
  private static final BeamSettings BEAM = new BeamSettings(new Voltage(10e3), new Current(1e-9));
  private static final Point HERE = new Point(0, 0);
  private static final Duration TEN_HOURS = Duration.ofHours(10);

  @ParameterizedTest(name = "{0}")
  @CsvFileSource(resources = "times.tsv", delimiter = '\t', numLinesToSkip = 0)
  void isTheWorkedValue(String id, double seconds, double tolerance) {
    assertEquals(seconds, computed(id), tolerance, id);
  }

  private static double computed(String id) {
    return switch (id) {
      case "11.1/one-pass" -> seconds(beamOn(map(2048, 40_000, "green"), 1));
      case "11.1/three-bands" -> seconds(beamOn(threeBands(), 3));
      case "11.1/flyback" -> seconds(scans(threeBands(), 3).minus(beamOn(threeBands(), 3)));
      case "11.1/total" -> seconds(total(threeBands(), 3));
      case "11.2/pixels" -> seconds(beamOn(map(64, 200_000_000, "green"), 1));
      case "11.3" -> seconds(beamOn(map(256, 200_000_000, "green"), 1));
      case "11.4/1-mm" -> seconds(stage(Duration.ZERO).travel(HERE, new Point(1e-3, 0)));
      case "11.4/0.1-mm" -> seconds(stage(Duration.ZERO).travel(HERE, new Point(0, 1e-4)));
      case "11.4/0.05-mm" -> seconds(stage(Duration.ZERO).travel(HERE, new Point(5e-5, 0)));
      case "11.5" -> seconds(serpentine());
      case "11.7/passes-in-10-h" -> TEN_HOURS.dividedBy(beamOn(map(2048, 40_000, "green"), 1));
      default -> throw new IllegalArgumentException("no check is called " + id);
    };
  }

  private static double seconds(Duration time) {
    return time.toNanos() * 1e-9;
  }

  private static Job threeBands() {
    return map(2048, 40_000, "violet", "green", "red");
  }

  private static Duration beamOn(Job job, int passes) {
    Duration sum = Duration.ZERO;
    for (int pass = 0; pass < passes; pass++) {
      sum = sum.plus(Exposures.pass(job, pass, abilities()).whole().beamOn());
    }
    return sum;
  }

  private static Duration scans(Job job, int passes) {
    Duration sum = Duration.ZERO;
    for (int pass = 0; pass < passes; pass++) {
      sum = sum.plus(Exposures.pass(job, pass, abilities()).whole().duration());
    }
    return sum;
  }

  /** Each pass as one exposure, the filter changed between two. */
  private static Duration total(Job job, int passes) {
    Duration sum = scans(job, passes);
    for (int pass = 0; pass < passes; pass++) {
      sum = sum.plus(Timings.frameStart(job.acquisition().mode(), abilities()));
      if (pass > 0) {
        sum = sum.plus(changed(job, pass - 1, pass));
      }
    }
    return sum;
  }

  private static Duration changed(Job job, int from, int to) {
    Optional<Conditions> before = Optional.of(conditions(job, from));
    return Timings.preparation(before, Optional.of(HERE), conditions(job, to), HERE, abilities());
  }

  private static Conditions conditions(Job job, int pass) {
    return new Conditions(
        BEAM, Mode.INTENSITY_MAP, Exposures.pass(job, pass, abilities()).filter());
  }

  /** Five by four tiles of 0.2 mm without overlap, one after the other. */
  private static Duration serpentine() {
    List<Rectangle> tiles = new Mosaic(5, 4, 2e-4, 2e-4, 0, HERE, 0).tiles();
    Stage stage = stage(Duration.ofSeconds(2));
    Duration sum = Duration.ZERO;
    for (int i = 1; i < tiles.size(); i++) {
      sum = sum.plus(stage.travel(tiles.get(i - 1).centre(), tiles.get(i).centre()));
    }
    return sum;
  }

  private static Job map(int pixels, long dwellNanos, String... filters) {
    return new Job(
        "map",
        "sample",
        new Acquisition.Raster(
            Mode.INTENSITY_MAP, pixels, pixels, Duration.ofNanos(dwellNanos), List.of(filters), 1),
        Rectangle.of(HERE, 1e-4, 1e-4),
        BEAM,
        5,
        List.of(),
        AtCap.REFUSE,
        Optional.empty(),
        Optional.empty());
  }

  private static Stage stage(Duration settling) {
    return new Stage(-0.025, 0.025, -0.025, 0.025, 1e-3, 10e-3, settling, 0);
  }

  private static Abilities abilities() {
    ModeAbility mode =
        new ModeAbility(
            Duration.ofNanos(100),
            Duration.ofSeconds(1),
            OptionalDouble.empty(),
            Duration.ofNanos(200_000),
            Duration.ofMillis(2500),
            ModeAbility.Boundary.LINE);
    return new Abilities(
        "room",
        stage(Duration.ofSeconds(2)),
        new Field(1e-3, 0),
        new Column(
            new Voltage(1e3),
            new Voltage(30e3),
            Duration.ofMinutes(12),
            new Current(1e-12),
            new Current(40e-9),
            Duration.ofMinutes(2)),
        new CurrentMeter(0, new Current(0), 0, Duration.ofHours(1), Duration.ofSeconds(30)),
        new Blanker(Blanker.Kind.FAST, Optional.of(Duration.ZERO)),
        Map.of(),
        Duration.ofSeconds(4),
        Map.of(Mode.INTENSITY_MAP, mode),
        List.of());
  }
}
