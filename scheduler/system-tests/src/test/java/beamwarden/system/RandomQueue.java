package beamwarden.system;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Mode;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Region;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Current;
import beamwarden.quantity.Fluence;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Area;
import beamwarden.queue.AtCap;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.Job;
import beamwarden.queue.Material;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.SplittableRandom;

/**
 * A queue drawn from a seed: samples with a capped and a sacrificial area, rasters, mosaics and
 * counts at points; caps so wide that all fits, or so tight that much does not.
 */
final class RandomQueue {
  private static final double PATCH = 60e-6;
  private final SplittableRandom random;
  private final boolean tight;

  RandomQueue(long seed, boolean tight) {
    this.random = new SplittableRandom(seed);
    this.tight = tight;
  }

  Queue draw(int samples, int jobs) {
    List<Sample> drawn = new ArrayList<>();
    for (int i = 0; i < samples; i++) {
      drawn.add(sample(i));
    }
    List<Job> wanted = new ArrayList<>();
    for (int i = 0; i < jobs; i++) {
      wanted.add(job(i, drawn.get(random.nextInt(samples)), wanted));
    }
    return new Queue("drawn", drawn, wanted);
  }

  private Sample sample(int number) {
    Placement placement =
        new Placement(new Point(number * 4e-3 - 6e-3, 1e-3), random.nextInt(4) * 7.5, 2e-6);
    double room = tight ? random.nextDouble(60, 900) : 1e6;
    List<Cap> caps =
        List.of(
            new Cap.OnFluence(
                new Fluence(room), new Averaging.OverGeneration(), Optional.empty(), ""),
            new Cap.OnFluence(
                new Fluence(tight ? room / 2 : 1e6),
                new Averaging.OverGeneration(),
                Optional.of("kept"),
                "kept for other work"),
            new Cap.OnCharge(new Charge(tight ? 2e-6 : 1), Optional.empty(), ""),
            new Cap.OnCharge(new Charge(tight ? 2e-8 : 1), Optional.of("spent"), ""));
    List<Area> areas =
        List.of(
            new Area("kept", Rectangle.of(new Point(20e-6, 20e-6), 40e-6, 30e-6), Area.Use.CAPPED),
            new Area("never", Rectangle.of(new Point(-250e-6, 0), 20e-6, 20e-6), Area.Use.KEEP_OUT),
            new Area(
                "spent", Rectangle.of(new Point(0, 300e-6), 40e-6, 40e-6), Area.Use.SACRIFICIAL));
    return new Sample(
        "s" + number, "drawn", Optional.of(new Material("SiO2", 2.65)), placement, areas, caps);
  }

  private Job job(int number, Sample sample, List<Job> before) {
    boolean spot = random.nextInt(5) == 0;
    BeamSettings beam =
        new BeamSettings(
            new Voltage(random.nextBoolean() ? 5e3 : 8e3),
            new Current(spot ? 15e-12 : random.nextInt(1, 4) * 100e-12));
    List<String> after =
        before.isEmpty() || random.nextInt(4) > 0
            ? List.of()
            : List.of(before.get(random.nextInt(before.size())).id());
    AtCap[] choices = {AtCap.REFUSE, AtCap.TRIM, AtCap.TRIM};
    return new Job(
        "j" + number,
        sample.id(),
        spot ? count() : raster(),
        spot ? points() : region(),
        beam,
        random.nextInt(1, 10),
        after,
        choices[random.nextInt(choices.length)],
        Optional.empty(),
        Optional.empty());
  }

  private Acquisition count() {
    OptionalLong enough = random.nextBoolean() ? OptionalLong.of(2000) : OptionalLong.empty();
    return new Acquisition.Spot(
        Mode.PHOTON_CORRELATION, Duration.ofSeconds(random.nextInt(60, 400)), enough);
  }

  private Acquisition raster() {
    int columns = random.nextInt(50, 200);
    int rows = random.nextInt(50, 200);
    Duration dwell = Duration.ofNanos(random.nextInt(2000, 50_000) * 100L);
    List<String> filters = new ArrayList<>(List.of("violet", "green", "red"));
    filters.subList(random.nextInt(1, 4), 3).clear();
    return new Acquisition.Raster(
        Mode.INTENSITY_MAP, columns, rows, dwell, filters, random.nextInt(1, 3));
  }

  private Region region() {
    Point centre = new Point(random.nextDouble(-PATCH, PATCH), random.nextDouble(-PATCH, PATCH));
    double turn = random.nextInt(3) == 0 ? random.nextDouble(0, 90) : 0;
    double width = random.nextDouble(10e-6, 60e-6);
    double height = random.nextDouble(10e-6, 60e-6);
    if (random.nextInt(4) == 0) {
      return new Mosaic(2, 2, width, height, random.nextDouble(0, 0.2), centre, turn);
    }
    return new Rectangle(centre, width, height, turn);
  }

  private Region points() {
    List<Point> places = new ArrayList<>();
    for (int i = random.nextInt(1, 4); i > 0; i--) {
      places.add(
          new Point(random.nextDouble(-8e-6, 8e-6), 300e-6 + random.nextDouble(-8e-6, 8e-6)));
    }
    return new Points(places);
  }
}
