package beamwarden.simulated;

import beamwarden.beam.Conditions;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Grant;
import beamwarden.timing.Timeline;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;

/**
 * Data files in open formats, each on disk, with its sidecar, before it is named to anybody: images
 * as 16-bit PGM (netpbm's P5, 65535 brightest, the higher byte first), counts as CSV.
 */
final class DataFolder {
  private static final String IMAGE = "image/x-portable-graymap";
  private static final String TABLE = "text/csv";
  private static final String SIDECAR = "application/json";

  private final Path folder;
  private final Timeline time;

  DataFolder(Path folder, Timeline time) {
    this.folder = folder;
    this.time = time;
  }

  /** Writes an image of so many columns and lines. */
  List<DataFile> image(Grant grant, int columns, int lines, byte[] pixels) {
    String header = "P5\n" + columns + " " + lines + "\n65535\n";
    ByteArrayOutputStream bytes = new ByteArrayOutputStream(header.length() + pixels.length);
    bytes.writeBytes(header.getBytes(StandardCharsets.US_ASCII));
    bytes.writeBytes(pixels);
    return written(grant, ".pgm", IMAGE, bytes.toByteArray(), Map.of());
  }

  /** Writes the photons of each second. */
  List<DataFile> table(Grant grant, List<Long> eachSecond, Map<String, Long> counts) {
    StringBuilder rows = new StringBuilder("second,photons\n");
    for (int second = 0; second < eachSecond.size(); second++) {
      rows.append(second).append(',').append(eachSecond.get(second)).append('\n');
    }
    return written(
        grant, ".csv", TABLE, rows.toString().getBytes(StandardCharsets.US_ASCII), counts);
  }

  private List<DataFile> written(
      Grant grant, String ending, String type, byte[] bytes, Map<String, Long> counts) {
    String job = grant.exposure().job().replaceAll("[^A-Za-z0-9_-]", "_");
    String name = "%06d-%d-%s".formatted(grant.number(), grant.fence(), job);
    try {
      Files.createDirectories(folder);
      DataFile data = write(name + ending, type, bytes);
      DataFile sidecar =
          write(
              name + ".json",
              SIDECAR,
              sidecar(grant, data, counts).getBytes(StandardCharsets.UTF_8));
      try (FileChannel names = FileChannel.open(folder)) {
        names.force(true);
      }
      return List.of(data, sidecar);
    } catch (IOException failure) {
      throw new UncheckedIOException(
          "the simulated instrument cannot write data into " + folder, failure);
    }
  }

  private DataFile write(String name, String type, byte[] bytes) throws IOException {
    Path file = folder.resolve(name);
    try (FileChannel channel =
        FileChannel.open(
            file,
            StandardOpenOption.CREATE,
            StandardOpenOption.TRUNCATE_EXISTING,
            StandardOpenOption.WRITE)) {
      ByteBuffer left = ByteBuffer.wrap(bytes);
      while (left.hasRemaining()) {
        channel.write(left);
      }
      channel.force(true);
    }
    return new DataFile(file.toAbsolutePath().toString(), type, bytes.length, sha256(bytes));
  }

  private String sidecar(Grant grant, DataFile data, Map<String, Long> counts) {
    Conditions conditions = grant.exposure().conditions();
    StringBuilder json = new StringBuilder();
    json.append("{\"grant\":%d,\"fence\":%d,".formatted(grant.number(), grant.fence()))
        .append("\"chain_head\":%s,".formatted(Json.text(grant.chainHead())))
        .append("\"job\":%s,".formatted(Json.text(grant.exposure().job())))
        .append("\"pass\":%d,".formatted(grant.exposure().pass()))
        .append("\"sample\":%s,".formatted(Json.text(grant.exposure().sample())))
        .append("\"mode\":\"%s\",".formatted(conditions.mode().text()))
        .append("\"filter\":%s,".formatted(Json.text(conditions.filter())))
        .append("\"voltage_V\":%s,".formatted(conditions.beam().voltage().volts()))
        .append("\"wished_current_A\":%s,".formatted(conditions.beam().current().amperes()))
        .append("\"ended\":\"%s\",".formatted(time.instant()));
    new TreeMap<>(counts)
        .forEach((name, count) -> json.append(Json.text(name) + ":" + count + ","));
    return json.append("\"file\":%s,".formatted(Json.text(data.path())))
        .append("\"sha256\":\"%s\",\"scene\":\"invented\"}\n".formatted(data.sha256()))
        .toString();
  }

  private static String sha256(byte[] bytes) {
    try {
      return HexFormat.of().formatHex(MessageDigest.getInstance("SHA-256").digest(bytes));
    } catch (NoSuchAlgorithmException everyJavaHasIt) {
      throw new IllegalStateException(everyJavaHasIt);
    }
  }
}
