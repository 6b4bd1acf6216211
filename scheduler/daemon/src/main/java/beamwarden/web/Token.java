package beamwarden.web;

import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;

/** The token that every change must show; kept as a hash, compared in constant time. */
final class Token {
  private static final String SCHEME = "Bearer ";

  private final byte[] hash;

  Token(String token) {
    this.hash = hash(token);
  }

  /** Whether a header {@code Authorization} shows it. */
  boolean shownIn(String authorization) {
    return authorization != null
        && authorization.regionMatches(true, 0, SCHEME, 0, SCHEME.length())
        && MessageDigest.isEqual(hash, hash(authorization.substring(SCHEME.length()).strip()));
  }

  private static byte[] hash(String text) {
    try {
      return MessageDigest.getInstance("SHA-256").digest(text.getBytes(StandardCharsets.UTF_8));
    } catch (NoSuchAlgorithmException impossible) {
      throw new IllegalStateException("every Java platform has SHA-256", impossible);
    }
  }
}
