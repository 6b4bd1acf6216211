package beamwarden.web.api;

import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.StandardCharsets;
import java.util.Optional;

/** The bytes of a request's body; never changes. */
public final class Body {
  /** No body. */
  public static final Body NONE = new Body(new byte[0]);

  private final byte[] bytes;

  /** A body of these bytes, which must not be changed any more. */
  public Body(byte[] bytes) {
    this.bytes = bytes.clone();
  }

  boolean isEmpty() {
    return bytes.length == 0;
  }

  /** The text, or empty when it is not in UTF-8. */
  Optional<String> text() {
    try {
      return Optional.of(
          StandardCharsets.UTF_8.newDecoder().decode(ByteBuffer.wrap(bytes)).toString());
    } catch (CharacterCodingException notUtf8) {
      return Optional.empty();
    }
  }
}
