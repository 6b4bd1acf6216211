package beamwarden.simulated;

import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;

/**
 * What the scan engine was told to do; it goes on with it whether or not anybody listens.
 *
 * @param grant the grant's number
 * @param fence the grant's fencing number
 * @param sample the sample under the beam
 * @param placement where that sample sits
 * @param scan what to do
 * @param limitNanos the beam-on time after which the engine blanks by itself
 * @param firstElectron when the beam comes on
 */
record Run(
    long grant,
    long fence,
    String sample,
    Placement placement,
    Scan scan,
    long limitNanos,
    Instant firstElectron) {
  /** The path of its beam. */
  BeamPath path(boolean flybackBlanked) {
    return new BeamPath(scan, flybackBlanked, limitNanos);
  }

  List<Object> words() {
    List<Object> words =
        new ArrayList<>(
            List.of(
                grant,
                fence,
                sample,
                placement.origin().xMetres(),
                placement.origin().yMetres(),
                placement.turnDegrees(),
                placement.uncertaintyMetres(),
                limitNanos,
                firstElectron));
    words.addAll(scan instanceof RasterScan raster ? words(raster) : words((SpotScan) scan));
    return words;
  }

  static Run read(Words words) {
    long grant = words.whole();
    long fence = words.whole();
    String sample = words.text();
    Placement placement =
        new Placement(new Point(words.number(), words.number()), words.number(), words.number());
    long limitNanos = words.whole();
    Instant firstElectron = Instant.parse(words.text());
    return new Run(grant, fence, sample, placement, scan(words), limitNanos, firstElectron);
  }

  private static List<Object> words(RasterScan raster) {
    Rectangle frame = raster.frame();
    return List.of(
        "raster",
        frame.centre().xMetres(),
        frame.centre().yMetres(),
        frame.widthMetres(),
        frame.heightMetres(),
        frame.turnDegrees(),
        raster.columns(),
        raster.rows(),
        raster.firstRow(),
        raster.rowCount(),
        raster.dwell().toNanos(),
        raster.flyback().toNanos());
  }

  private static List<Object> words(SpotScan spot) {
    return List.of("spot", spot.at().xMetres(), spot.at().yMetres(), spot.time().toNanos());
  }

  private static Scan scan(Words words) {
    if (words.text().equals("spot")) {
      return new SpotScan(
          new Point(words.number(), words.number()), Duration.ofNanos(words.whole()));
    }
    Rectangle frame =
        new Rectangle(
            new Point(words.number(), words.number()),
            words.number(),
            words.number(),
            words.number());
    return new RasterScan(
        frame,
        (int) words.whole(),
        (int) words.whole(),
        (int) words.whole(),
        (int) words.whole(),
        Duration.ofNanos(words.whole()),
        Duration.ofNanos(words.whole()));
  }
}
