package beamwarden.document;

import java.io.IOException;
import java.io.InputStream;
import java.nio.ByteBuffer;
import java.nio.CharBuffer;
import java.nio.charset.CharsetDecoder;
import java.nio.charset.CoderResult;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.List;
import java.util.Optional;
import java.util.function.BiFunction;

/** Documents as texts: how they come from a file, and what identifies them. */
public final class Documents {
  private static final Node.Mark NOWHERE = new Node.Mark(0, 0);
  private static final char BYTE_ORDER_MARK = '\ufeff';

  private Documents() {}

  /**
   * The text of a file in UTF-8; a file that cannot be opened, is too large or is not in UTF-8 is a
   * problem of the reading.
   */
  public static Reading<String> text(Path file) {
    Problems problems = new Problems(file.toString());
    Optional<String> text = bytes(file, problems).flatMap(bytes -> decoded(bytes, problems));
    return problems.reading(text);
  }

  /** The SHA-256 of a document's text in UTF-8, in lower-case hexadecimal digits. */
  public static String hash(String text) {
    try {
      MessageDigest digest = MessageDigest.getInstance("SHA-256");
      return HexFormat.of().formatHex(digest.digest(text.getBytes(StandardCharsets.UTF_8)));
    } catch (NoSuchAlgorithmException impossible) {
      throw new IllegalStateException("every Java platform has SHA-256", impossible);
    }
  }

  /** Reads a file's text, then hands its name and text on. */
  static <T> Reading<T> read(Path file, BiFunction<String, String, Reading<T>> reader) {
    Reading<String> text = text(file);
    return text.value()
        .map(found -> reader.apply(file.toString(), found))
        .orElseGet(() -> new Reading<>(Optional.empty(), text.problems()));
  }

  /** The tree of a text whose size and characters are what they should be, or empty. */
  static Optional<Node> tree(String text, Problems problems) {
    String bare = text.indexOf(BYTE_ORDER_MARK) == 0 ? text.substring(1) : text;
    return fits(bare, problems) && clean(bare, problems)
        ? TreeReader.read(bare, problems)
        : Optional.empty();
  }

  private static Optional<byte[]> bytes(Path file, Problems problems) {
    try (InputStream in = Files.newInputStream(file)) {
      byte[] bytes = in.readNBytes(Limits.BYTES + 1);
      if (bytes.length > Limits.BYTES) {
        tooLarge(problems);
        return Optional.empty();
      }
      return Optional.of(bytes);
    } catch (NoSuchFileException missing) {
      problems.error(NOWHERE, file + " does not exist", "check the path");
    } catch (IOException failed) {
      problems.error(
          NOWHERE,
          file + " cannot be read: " + Printed.quoted(String.valueOf(failed.getMessage())),
          "check that it is a file and that you may read it");
    }
    return Optional.empty();
  }

  private static Optional<String> decoded(byte[] bytes, Problems problems) {
    CharsetDecoder decoder = StandardCharsets.UTF_8.newDecoder();
    CharBuffer text = CharBuffer.allocate(bytes.length);
    CoderResult result = decoder.decode(ByteBuffer.wrap(bytes), text, true);
    text.flip();
    if (result.isError()) {
      problems.error(
          end(text), "the file is not in UTF-8 from here on", "save it with the encoding UTF-8");
      return Optional.empty();
    }
    return Optional.of(text.toString());
  }

  private static boolean fits(String text, Problems problems) {
    if (text.length() > Limits.BYTES
        || text.getBytes(StandardCharsets.UTF_8).length > Limits.BYTES) {
      tooLarge(problems);
      return false;
    }
    return true;
  }

  private static void tooLarge(Problems problems) {
    problems.error(
        NOWHERE,
        "the document has more than " + Limits.BYTES + " bytes, the most that is read",
        "share its jobs out to several queues");
  }

  /** Whether the text has no control character, which no editor shows. */
  private static boolean clean(String text, Problems problems) {
    for (int index = 0; index < text.length(); index++) {
      char character = text.charAt(index);
      if (Character.isISOControl(character) && "\t\n\r".indexOf(character) < 0) {
        problems.error(
            end(CharBuffer.wrap(text, 0, index)),
            String.format("there is a control character here, U+%04X", (int) character),
            "delete it, and check that the file is a text in UTF-8");
        return false;
      }
    }
    return true;
  }

  /** The place just after a text. */
  private static Node.Mark end(CharSequence text) {
    List<String> lines = List.of(text.toString().split("\r\n|\r|\n", -1));
    String last = lines.get(lines.size() - 1);
    return new Node.Mark(lines.size(), last.codePointCount(0, last.length()) + 1);
  }
}
