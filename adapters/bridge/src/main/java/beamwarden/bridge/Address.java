package beamwarden.bridge;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.PosixFilePermission;
import java.nio.file.attribute.PosixFilePermissions;
import java.util.Optional;
import java.util.Set;
import tools.jackson.core.JacksonException;

/**
 * Where an adapter of a folder can be spoken to, and what proves that one may: the content of the
 * folder's file {@code address}, which only its owner can read.
 *
 * @param host a loopback address
 * @param port its port
 * @param token what a daemon must show
 * @param pid the adapter's process
 */
record Address(String host, int port, String token, long pid) {
  static final String FILE = "address";

  private static final Set<PosixFilePermission> OWNER_ONLY =
      PosixFilePermissions.fromString("rw-------");
  private static final Set<PosixFilePermission> OWNER_ONLY_FOLDER =
      PosixFilePermissions.fromString("rwx------");

  /** Makes a folder, where it is missing, that only its owner can enter. */
  static void prepare(Path folder) throws IOException {
    if (!Files.isDirectory(folder)) {
      Files.createDirectories(folder, PosixFilePermissions.asFileAttribute(OWNER_ONLY_FOLDER));
    }
  }

  /** Writes a file that only its owner can read, whole or not at all. */
  static void write(Path file, byte[] content) throws IOException {
    Path fresh = file.resolveSibling(file.getFileName() + ".new");
    Files.deleteIfExists(fresh);
    try (FileChannel channel =
        FileChannel.open(
            fresh,
            Set.of(StandardOpenOption.CREATE_NEW, StandardOpenOption.WRITE),
            PosixFilePermissions.asFileAttribute(OWNER_ONLY))) {
      ByteBuffer bytes = ByteBuffer.wrap(content);
      while (bytes.hasRemaining()) {
        channel.write(bytes);
      }
      channel.force(true);
    }
    Files.move(fresh, file, StandardCopyOption.ATOMIC_MOVE);
  }

  void writeTo(Path folder) throws IOException {
    write(folder.resolve(FILE), ContractJson.mapper().writeValueAsBytes(this));
  }

  /**
   * The address in a folder, if there is one.
   *
   * @throws IOException when it cannot be read, or others could have read it
   */
  static Optional<Address> in(Path folder) throws IOException {
    Path file = folder.resolve(FILE);
    try {
      if (!OWNER_ONLY.containsAll(Files.getPosixFilePermissions(file))) {
        throw new IOException(
            file + " is open to others than its owner; end the adapter, make it rw-------");
      }
      byte[] content = Files.readAllBytes(file);
      return Optional.of(ContractJson.mapper().readValue(content, Address.class));
    } catch (NoSuchFileException e) {
      return Optional.empty();
    } catch (JacksonException e) {
      throw new IOException(file + " is no address of an adapter: " + e.getOriginalMessage(), e);
    }
  }
}
