package beamwarden.ledger;

import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;

/**
 * The hashes that chain the books, so that any other program can verify them.
 *
 * <p>A hash is the SHA-256 of a row of fields, written in lower-case hexadecimal. Each field is
 * text in UTF-8, preceded by its length in bytes as four bytes, the highest first; numbers are
 * decimal without leading zeros. With the lengths, no two different rows of fields give the same
 * bytes.
 *
 * <ul>
 *   <li>Before the first entry of a chain stands the hash of: {@code beamwarden chain 1}, the
 *       store's id, the chain's name.
 *   <li>The hash of an entry is that of: {@code beamwarden entry 1}, the hash before it in its
 *       chain, then its number, moment, fence, chain, kind, format and body as they are stored.
 * </ul>
 */
public final class ChainHash {
  private static final String CHAIN_TAG = "beamwarden chain 1";
  private static final String ENTRY_TAG = "beamwarden entry 1";

  private ChainHash() {}

  /** What stands before the first entry of a chain. */
  public static String genesis(String store, String chain) {
    return hash(CHAIN_TAG, store, chain);
  }

  /**
   * The hash of an entry.
   *
   * @param previous the hash before it in its chain, or the {@link #genesis}
   * @param number its number
   * @param at its moment as stored: RFC 3339, in UTC
   * @param fence the fencing number under which it was stored
   * @param chain its chain
   * @param kind the name of its kind
   * @param format the number of the body's format
   * @param body its body as stored
   */
  public static String entry(
      String previous,
      long number,
      String at,
      long fence,
      String chain,
      String kind,
      int format,
      String body) {
    return hash(
        ENTRY_TAG,
        previous,
        Long.toString(number),
        at,
        Long.toString(fence),
        chain,
        kind,
        Integer.toString(format),
        body);
  }

  private static String hash(String... fields) {
    MessageDigest digest = sha256();
    for (String field : fields) {
      byte[] bytes = field.getBytes(StandardCharsets.UTF_8);
      digest.update(ByteBuffer.allocate(Integer.BYTES).putInt(bytes.length).flip());
      digest.update(bytes);
    }
    return HexFormat.of().formatHex(digest.digest());
  }

  private static MessageDigest sha256() {
    try {
      return MessageDigest.getInstance("SHA-256");
    } catch (NoSuchAlgorithmException e) {
      throw new IllegalStateException("every Java platform has SHA-256, but not this one", e);
    }
  }
}
