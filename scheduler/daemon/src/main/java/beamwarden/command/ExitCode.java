package beamwarden.command;

/** What a command says to the script that called it. */
enum ExitCode {
  /** It was done, or the answer is yes. */
  FINE(0),
  /** The answer is no: something does not fit, is refused, or is not there. */
  NO(1),
  /** The command was called wrongly. */
  USAGE(2),
  /** The outside world failed: a file, a store, a daemon, the network. */
  OUTSIDE(3);

  private final int code;

  ExitCode(int code) {
    this.code = code;
  }

  int code() {
    return code;
  }
}
