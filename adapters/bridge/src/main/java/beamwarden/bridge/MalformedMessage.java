package beamwarden.bridge;

import java.util.OptionalLong;

/** A line that is no message of ours; its text is one sentence for a person. */
final class MalformedMessage extends Exception {
  private final ErrorCode code;
  private final OptionalLong id;

  MalformedMessage(ErrorCode code, OptionalLong id, String sentence) {
    super(sentence);
    this.code = code;
    this.id = id;
  }

  MalformedMessage(ErrorCode code, String sentence) {
    this(code, OptionalLong.empty(), sentence);
  }

  /** What an adapter answers to it. */
  Message.Refused refusal() {
    return new Message.Refused(id, code.number(), getMessage());
  }
}
