package beamwarden.simulated;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.util.List;

/** A text file of lines that survives a crash: lines are appended and forced, or all replaced. */
final class DurableFile {
  private final Path file;

  /** The file; a last line that a crash has torn off is cut away. */
  DurableFile(Path file) {
    this.file = file;
    doing(() -> Files.createDirectories(file.toAbsolutePath().getParent()));
    cutTornLine();
  }

  /** Whole lines, in order. */
  List<String> lines() {
    return Files.exists(file) ? reading(() -> Files.readAllLines(file)) : List.of();
  }

  /** Appends in one piece; on return the lines are on disk. */
  void append(List<String> lines) {
    doing(
        () -> {
          try (FileChannel channel =
              FileChannel.open(file, StandardOpenOption.CREATE, StandardOpenOption.APPEND)) {
            writeAll(channel, text(lines), true);
          }
        });
  }

  /**
   * Replaces everything at once and forces it: the file holds the old lines or the new ones, even
   * after a power failure.
   */
  void replace(List<String> lines) {
    exchange(lines, true);
  }

  /** Replaces everything at once, safe from the end of this process only. */
  void replaceQuickly(List<String> lines) {
    exchange(lines, false);
  }

  private void exchange(List<String> lines, boolean forced) {
    Path fresh = file.resolveSibling(file.getFileName() + ".new");
    doing(
        () -> {
          try (FileChannel channel =
              FileChannel.open(
                  fresh,
                  StandardOpenOption.CREATE,
                  StandardOpenOption.TRUNCATE_EXISTING,
                  StandardOpenOption.WRITE)) {
            writeAll(channel, text(lines), forced);
          }
          Files.move(
              fresh, file, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
          if (forced) {
            forceFolder();
          }
        });
  }

  private void cutTornLine() {
    doing(
        () -> {
          if (!Files.exists(file)) {
            return;
          }
          byte[] bytes = Files.readAllBytes(file);
          int end = bytes.length;
          while (end > 0 && bytes[end - 1] != '\n') {
            end--;
          }
          if (end < bytes.length) {
            try (FileChannel channel = FileChannel.open(file, StandardOpenOption.WRITE)) {
              channel.truncate(end).force(true);
            }
          }
        });
  }

  private void forceFolder() throws IOException {
    try (FileChannel folder = FileChannel.open(file.toAbsolutePath().getParent())) {
      folder.force(true);
    }
  }

  private static void writeAll(FileChannel channel, String text, boolean forced)
      throws IOException {
    ByteBuffer bytes = ByteBuffer.wrap(text.getBytes(StandardCharsets.UTF_8));
    while (bytes.hasRemaining()) {
      channel.write(bytes);
    }
    if (forced) {
      channel.force(true);
    }
  }

  private static String text(List<String> lines) {
    return String.join("\n", lines) + (lines.isEmpty() ? "" : "\n");
  }

  private void doing(Act act) {
    reading(
        () -> {
          act.run();
          return file;
        });
  }

  private <T> T reading(Source<T> source) {
    try {
      return source.read();
    } catch (IOException failure) {
      throw new UncheckedIOException(
          "the simulated instrument cannot use " + file + ": " + failure.getMessage(), failure);
    }
  }

  private interface Act {
    void run() throws IOException;
  }

  private interface Source<T> {
    T read() throws IOException;
  }
}
