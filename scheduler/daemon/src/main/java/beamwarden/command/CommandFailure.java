package beamwarden.command;

import java.util.List;
import java.util.Optional;

/** A command that ends early, with one sentence for a person. */
final class CommandFailure extends RuntimeException {
  private static final long serialVersionUID = 1L;

  private final ExitCode code;
  private transient Optional<String> answer = Optional.empty();
  private transient List<String> details = List.of();

  CommandFailure(ExitCode code, String message) {
    super(message);
    this.code = code;
  }

  CommandFailure(ExitCode code, String message, Throwable cause) {
    super(message, cause);
    this.code = code;
  }

  /** The same, with what a daemon answered and lines that say more. */
  CommandFailure answering(String json, List<String> lines) {
    answer = Optional.of(json);
    details = List.copyOf(lines);
    return this;
  }

  ExitCode code() {
    return code;
  }

  /** What a daemon answered, in JSON. */
  Optional<String> answer() {
    return answer;
  }

  /** Lines that say more. */
  List<String> details() {
    return details;
  }
}
