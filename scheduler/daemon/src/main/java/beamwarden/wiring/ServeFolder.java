package beamwarden.wiring;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.attribute.PosixFilePermissions;
import java.security.SecureRandom;
import java.util.HexFormat;

/**
 * Where everything of one store lies.
 *
 * @param root the folder
 */
record ServeFolder(Path root) {
  private static final int TOKEN_BYTES = 32;

  /** The file into which the daemon writes its address once it answers. */
  Path address() {
    return root.resolve("address");
  }

  /** The token that every change needs; readable by its owner only. */
  Path token() {
    return root.resolve("token");
  }

  /** How the store's line of time is tied to the wall clock. */
  Path lineOfTime() {
    return root.resolve("line-of-time.json");
  }

  /** The profile under which it was last served. */
  Path profile() {
    return root.resolve("profile.yaml");
  }

  /** A folder of an adapter's own. */
  Path adapter(String adapter, String instrument) {
    return root.resolve(adapter).resolve(instrument);
  }

  /** Makes the folder when it is missing. */
  void make() {
    try {
      Files.createDirectories(root);
    } catch (IOException failure) {
      throw new WiringException("the store " + root + " cannot be made: " + failure.getMessage());
    }
  }

  /** Reads the token, or makes one. */
  String readOrMakeToken() {
    try {
      if (Files.exists(token())) {
        return Files.readString(token()).strip();
      }
      byte[] random = new byte[TOKEN_BYTES];
      new SecureRandom().nextBytes(random);
      String made = HexFormat.of().formatHex(random);
      writePrivately(token(), made + "\n");
      return made;
    } catch (IOException failure) {
      throw new WiringException(
          "the token in " + root + " cannot be kept: " + failure.getMessage());
    }
  }

  /** Tells clients where the daemon answers; only once it does. */
  void writeAddress(String address) {
    try {
      writePrivately(address(), address + "\n");
    } catch (IOException failure) {
      throw new WiringException(address() + " cannot be written: " + failure.getMessage());
    }
  }

  /** The daemon no longer answers. */
  void forgetAddress() {
    try {
      Files.deleteIfExists(address());
    } catch (IOException failure) {
      throw new WiringException(address() + " cannot be deleted: " + failure.getMessage());
    }
  }

  /** Writes a file whole, readable by its owner only. */
  static void writePrivately(Path file, String text) throws IOException {
    Path fresh = file.resolveSibling(file.getFileName() + ".new");
    Files.deleteIfExists(fresh);
    boolean posix = file.getFileSystem().supportedFileAttributeViews().contains("posix");
    if (posix) {
      Files.createFile(
          fresh,
          PosixFilePermissions.asFileAttribute(PosixFilePermissions.fromString("rw-------")));
    }
    Files.writeString(fresh, text);
    Files.move(fresh, file, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
  }
}
