package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Grant;
import beamwarden.timing.VirtualTime;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.time.Duration;
import java.util.Arrays;
import java.util.HexFormat;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Counts and data files. */
class DetectorTest {
  private static final Simulation WRITING = new Simulation(3, true, true, true, FaultPlan.NONE);

  @TempDir Path folder;
  private final Session session = Session.exact();

  @Test
  void writesA16BitImageOfTheWholeLines() throws IOException, NoSuchAlgorithmException {
    Grant grant = session.map(7, 500);
    Detector.Counted counted = writing().count(grant, 300, Lab.GENTLE.current());
    DataFile image = counted.files().get(0);
    byte[] bytes = Files.readAllBytes(Path.of(image.path()));
    byte[] header = "P5\n1000 300\n65535\n".getBytes(StandardCharsets.US_ASCII);
    assertEquals(header.length + 2 * 1000 * 300, bytes.length);
    assertTrue(Arrays.equals(header, Arrays.copyOf(bytes, header.length)));
    assertEquals(bytes.length, image.bytes());
    assertEquals(
        HexFormat.of().formatHex(MessageDigest.getInstance("SHA-256").digest(bytes)),
        image.sha256());
    long sum = 0;
    ByteBuffer pixels = ByteBuffer.wrap(bytes, header.length, bytes.length - header.length);
    while (pixels.hasRemaining()) {
      sum += Short.toUnsignedLong(pixels.getShort());
    }
    assertEquals(sum, counted.counts().get("violet"));
  }

  @Test
  void writesASidecarThatNamesGrantChainAndSample() throws IOException {
    DataFile sidecar =
        writing().count(session.map(7, 500), 10, Lab.GENTLE.current()).files().get(1);
    String text = Files.readString(Path.of(sidecar.path()));
    for (String part :
        List.of(
            "\"grant\":7,",
            "\"chain_head\":\"head\"",
            "\"sample\":\"sst-07\"",
            "\"mode\":\"intensity-map\"",
            "\"scene\":\"invented\"")) {
      assertTrue(text.contains(part), () -> part + " in " + text);
    }
  }

  @Test
  void countsAboutTheSameWithAndWithoutAnImage() {
    Grant grant = session.map(7, 500);
    long written = writing().count(grant, 500, Lab.GENTLE.current()).counts().get("violet");
    Detector blind = new Detector(Simulation.inMemory(3), Optional.empty());
    long sampled = blind.count(grant, 500, Lab.GENTLE.current()).counts().get("violet");
    assertEquals(1, sampled / (double) written, 0.1);
  }

  @Test
  void laterLinesShowTheirOwnPlaces() {
    RasterScan later =
        new RasterScan(
            Session.raster(500).frame(),
            1000,
            500,
            300,
            10,
            Duration.ofNanos(25_000),
            Duration.ZERO);
    Scene scene = new Scene(3, "sst-07", "violet", true);
    double[] yields = new double[1000];
    double expected = 0;
    for (int line = 0; line < 10; line++) {
      scene.line(later, 300 + line, yields);
      expected += Arrays.stream(yields).sum();
    }
    expected *= Lab.GENTLE.current().electronsIn(Duration.ofNanos(25_000));
    Grant grant = session.grant(8, Lab.VIOLET, later);
    long counted = writing().count(grant, 10, Lab.GENTLE.current()).counts().get("violet");
    assertEquals(expected, (double) counted, 5 * Math.sqrt(expected));
  }

  @Test
  void countsTheExpectedWithoutNoise() {
    Detector exact = new Detector(Simulation.inMemory(3).withoutNoise(), Optional.empty());
    Grant grant = session.map(7, 500);
    Scene scene = new Scene(3, "sst-07", "violet", true);
    RasterScan raster = Session.raster(500);
    double expected =
        scene.mean(raster, 500)
            * Lab.GENTLE.current().electronsIn(Duration.ofNanos(25_000))
            * 1000
            * 500;
    assertEquals(
        Math.round(expected), exact.count(grant, 500, Lab.GENTLE.current()).counts().get("violet"));
  }

  @Test
  void countsNothingWhenNoLineIsWhole() {
    assertEquals(
        Detector.Counted.NOTHING, writing().count(session.map(7, 500), 0, Lab.GENTLE.current()));
  }

  @Test
  void twoPassesOfOnePlaceShowTheSameScene() {
    Scene once = new Scene(3, "sst-07", "violet", true);
    Scene again = new Scene(3, "sst-07", "violet", true);
    double[] first = new double[200];
    double[] second = new double[200];
    once.line(Session.raster(500), 17, first);
    again.line(Session.raster(500), 17, second);
    assertTrue(Arrays.equals(first, second));
    new Scene(4, "sst-07", "violet", true).line(Session.raster(500), 17, second);
    assertTrue(!Arrays.equals(first, second));
  }

  @Test
  void aCoarseAndAFineRasterSeeTheSamePlaces() {
    Scene scene = new Scene(3, "sst-07", "violet", true);
    RasterScan tiny =
        new RasterScan(
            Rectangle.of(Lab.MIDDLE, 1e-9, 1e-9),
            1,
            1,
            0,
            1,
            Duration.ofNanos(25_000),
            Duration.ZERO);
    double[] one = new double[1];
    scene.line(tiny, 0, one);
    assertEquals(scene.at(Lab.MIDDLE), one[0]);
  }

  private Detector writing() {
    return new Detector(
        WRITING, Optional.of(new DataFolder(folder, new VirtualTime(Session.EVENING))));
  }
}
