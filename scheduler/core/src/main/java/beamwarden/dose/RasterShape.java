package beamwarden.dose;

import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.physics.Lattice;
import beamwarden.quantity.Current;
import java.util.Collection;
import java.util.List;

/**
 * Strips of lines that a raster pass has touched.
 *
 * <p>The mean fluence is N/(pitch·pitch) with N = I·t/e electrons on a pixel. The upper value
 * divides by (1 − calibration)², takes the highest current, and takes for t the longest a pixel can
 * have been exposed:
 *
 * <ul>
 *   <li>the dwell, or where the beam was on for longer than the touched pixels take (the time to
 *       blank), that time shared evenly, since the scan goes on until the beam is off;
 *   <li>without blanked flyback also the whole flyback of a line, since the beam may rest at one
 *       end of the line for all of it.
 * </ul>
 *
 * <p>Its outline is wider than the strip on every side, by the calibration at the border of the
 * frame, in the middle of which the scan keeps still, and by how far off the pass may lie. Both
 * values are multiplied by the highest over the mean of the lattice of pixels.
 */
record RasterShape(RasterScan whole, double calibration, List<Lines> lines)
    implements PassDose.Shape {
  private static final double SQUARE_NANOMETRES = 1e18;

  static RasterShape of(PassKey key, RasterScan whole, Collection<Delivery> deliveries) {
    List<Lines> parts =
        deliveries.stream()
            .filter(delivery -> delivery.unitsTouched() > 0)
            .map(RasterShape::lines)
            .toList();
    return new RasterShape(whole, key.tolerances().calibration(), Lines.joined(parts));
  }

  private static Lines lines(Delivery delivery) {
    RasterScan scan = (RasterScan) delivery.exposure().scan();
    int touched = Math.toIntExact(delivery.unitsTouched());
    double pixel = scan.pitchXMetres() * scan.pitchYMetres() * SQUARE_NANOMETRES;
    double smallest = 1 - delivery.tolerances().calibration();
    return new Lines(
        scan.firstRow(),
        scan.firstRow() + touched,
        delivery.bestCurrent().electronsIn(scan.dwell()) / pixel,
        mostOnPixel(delivery, scan, touched) / (pixel * smallest * smallest));
  }

  private static double mostOnPixel(Delivery delivery, RasterScan scan, int touched) {
    Current current = delivery.upperCurrent();
    double inFlyback =
        delivery.tolerances().blanksFlyback() ? 0 : current.electronsIn(scan.flyback());
    double inPixels = current.electronsIn(delivery.upperBeamOn()) - touched * inFlyback;
    double shared = inPixels / ((double) touched * scan.columns());
    return Math.max(current.electronsIn(scan.dwell()), shared) + inFlyback;
  }

  @Override
  public List<Footprint> footprints(
      Worth worth, double sigmaMetres, double offsetMetres, Axes axes) {
    double lattice =
        Lattice.highest(sigmaMetres / whole.pitchXMetres())
            * Lattice.highest(sigmaMetres / whole.pitchYMetres());
    return lines.stream()
        .map(
            strip ->
                new Footprint(
                    box(strip.first(), strip.end(), worth, offsetMetres, axes),
                    (worth == Worth.UPPER ? strip.upper() : strip.best()) * lattice))
        .toList();
  }

  @Override
  public Box bounds(Worth worth, double sigmaMetres, double offsetMetres, Axes axes) {
    int first = lines.stream().mapToInt(Lines::first).min().orElseThrow();
    int end = lines.stream().mapToInt(Lines::end).max().orElseThrow();
    return box(first, end, worth, offsetMetres, axes);
  }

  @Override
  public Box core(double offsetMetres, Axes axes) {
    return bounds(Worth.UPPER, 0, offsetMetres, axes);
  }

  @Override
  public double mean(double sigmaMetres) {
    return lines.stream().mapToDouble(Lines::best).max().orElse(0);
  }

  private Box box(int first, int end, Worth worth, double offsetMetres, Axes axes) {
    Rectangle frame = whole.frame();
    double stretch = worth == Worth.UPPER ? calibration / 2 : 0;
    return Box.around(
        whole.strip(first, end - first),
        stretch * frame.widthMetres() + offsetMetres,
        stretch * frame.heightMetres() + offsetMetres,
        axes);
  }

  @Override
  public boolean touchesAnything() {
    return !lines.isEmpty();
  }
}
