package beamwarden.dose;

import beamwarden.beam.Point;
import beamwarden.physics.GaussianSpot;
import beamwarden.quantity.Fluence;
import beamwarden.queue.Area;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.Sample;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * Ground that the beam may not reach: keep-out areas, and sacrificial ones for what is not wholly
 * inside them.
 *
 * <p>Both are wider than drawn by the placement's uncertainty. A keep-out area is wider besides by
 * half the generation range, by which energy spreads sideways, and by 8σ of the probe; a point's
 * Gaussian counts out to 8σ. Spent ground reaches as far as the generation range.
 */
final class Ground {
  private static final double TAIL_SIGMAS = 8;

  /** How far electrons reach when nobody knows: beyond any sample. */
  private static final double ANYWHERE_METRES = 1;

  private Ground() {}

  static Area area(Sample sample, String name) {
    return sample
        .area(name)
        .orElseThrow(
            () ->
                new IllegalArgumentException(
                    "sample "
                        + sample.id()
                        + " has a cap on the area "
                        + name
                        + ", and no area of that name"));
  }

  static List<Area> areas(Sample sample, Area.Use use) {
    return sample.areas().stream().filter(area -> area.use() == use).toList();
  }

  static Box box(Area area, Axes axes) {
    return Box.around(area.outline(), 0, 0, axes);
  }

  /** The passes whose footprint touches an area. */
  static List<PassDose> touching(Sample sample, SampleDose dose, Area area, Worth worth) {
    Averages widest = Averages.widest(sample.material());
    double wider = worth == Worth.UPPER ? sample.placement().uncertaintyMetres() : 0;
    Axes axes = new Axes(area.outline().turnDegrees());
    Box box = box(area, axes).grown(wider);
    return dose.exposed().stream()
        .filter(pass -> touches(pass, worth, widest, sample, axes, box))
        .toList();
  }

  private static boolean touches(
      PassDose pass, Worth worth, Averages widest, Sample sample, Axes axes, Box box) {
    return pass.bounds(worth, widest, sample.placement(), axes).overlaps(box)
        && pass.footprints(worth, widest, sample.placement(), axes).stream()
            .anyMatch(footprint -> footprint.box().overlaps(box));
  }

  /** Why what is asked may not go where it goes. */
  static Stream<CapVerdict.Refused> refusals(Caps.Request request) {
    return Stream.concat(
        areas(request.sample(), Area.Use.KEEP_OUT).stream()
            .flatMap(area -> refusals(request, area, Ground::reachesKeepOut, "keep-out area")),
        areas(request.sample(), Area.Use.SACRIFICIAL).stream()
            .flatMap(
                area -> refusals(request, area, Ground::reachesSpent, "spent ground of the area")));
  }

  private static Stream<CapVerdict.Refused> refusals(
      Caps.Request request, Area area, Reach reach, String what) {
    return request.alone().exposed().stream()
        .filter(pass -> reach.reaches(pass, request.sample(), area))
        .map(pass -> refused(request, area, what, pass));
  }

  private static boolean reachesKeepOut(PassDose pass, Sample sample, Area area) {
    Averages widest = Averages.widest(sample.material());
    Axes axes = new Axes(area.outline().turnDegrees());
    double probe = GaussianSpot.sigma(pass.key().tolerances().probeMetres());
    double wider =
        sample.placement().uncertaintyMetres() + range(pass, widest) / 2 + TAIL_SIGMAS * probe;
    return touches(pass, Worth.UPPER, widest, sample, axes, box(area, axes).grown(wider));
  }

  private static boolean reachesSpent(PassDose pass, Sample sample, Area area) {
    Axes axes = new Axes(area.outline().turnDegrees());
    Box core = pass.core(sample.placement(), axes);
    double uncertainty = sample.placement().uncertaintyMetres();
    double wider = uncertainty + range(pass, Averages.widest(sample.material()));
    return !box(area, axes).shrunk(uncertainty).contains(core)
        && box(area, axes).grown(wider).overlaps(core);
  }

  /** The generation range in metres; beyond any sample when the material is not known. */
  private static double range(PassDose pass, Averages widest) {
    return widest
        .range()
        .map(known -> known.at(pass.key().conditions().beam().voltage()).metres())
        .orElse(ANYWHERE_METRES);
  }

  private static CapVerdict.Refused refused(
      Caps.Request request, Area area, String what, PassDose pass) {
    Axes axes = new Axes(area.outline().turnDegrees());
    Point at = axes.out(pass.core(request.sample().placement(), axes).middle());
    String because =
        request.job()
            + " would reach the "
            + what
            + " "
            + area.name()
            + (request.sample().material().isPresent()
                ? ", position uncertainty and the spread of electrons counted in"
                : "; how far electrons spread is not known without the sample's material");
    Cap none =
        new Cap.OnFluence(Fluence.ZERO, new Averaging.OverProbe(), Optional.of(area.name()), what);
    return new CapVerdict.Refused(none, Caps.FLUENCE_UNIT, 0, 0, 0, Optional.of(at), because);
  }

  /** Whether a pass reaches an area. */
  private interface Reach {
    boolean reaches(PassDose pass, Sample sample, Area area);
  }
}
