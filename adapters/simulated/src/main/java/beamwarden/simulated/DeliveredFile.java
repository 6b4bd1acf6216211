package beamwarden.simulated;

import java.nio.file.Path;
import java.util.List;

/** The truth as a file of JSON lines. */
final class DeliveredFile implements DeliveredRecord {
  private final DurableFile file;

  DeliveredFile(Path path) {
    this.file = new DurableFile(path);
  }

  @Override
  public void append(List<Stretch> stretches) {
    file.append(stretches.stream().map(Stretch::json).toList());
  }

  @Override
  public boolean holds(long grant, long fence) {
    String mark = "\"grant\":" + grant + ",\"fence\":" + fence + ",";
    return file.lines().stream().anyMatch(line -> line.contains(mark));
  }
}
