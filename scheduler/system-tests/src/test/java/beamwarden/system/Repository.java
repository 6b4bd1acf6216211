package beamwarden.system;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;

/** The checkout that is tested. */
final class Repository {
  /** Its root; Maven says where, and a test started otherwise stands in this module's folder. */
  static final Path ROOT =
      Path.of(System.getProperty("beamwarden.root", "../..")).toAbsolutePath().normalize();

  private Repository() {}

  static String read(Path file) {
    try {
      return Files.readString(file);
    } catch (IOException failure) {
      throw new UncheckedIOException(failure);
    }
  }
}
