package beamwarden.queue;

import java.util.Locale;

/** Where a job stands. */
public enum JobState {
  /** Its time has not come: no shift, another job first, or a moment not yet reached. */
  WAITING,
  /** It may be exposed as soon as the instrument is free. */
  READY,
  /** Its exposures are being made. */
  RUNNING,
  /** A person, or something only a person can judge, holds it. */
  HELD,
  /** All of it is done. */
  DONE,
  /** It ended with a part done. */
  SHORTENED,
  /** A check forbids it. */
  REFUSED,
  /** It could not be done. */
  FAILED,
  /** A person took it back. */
  WITHDRAWN;

  /** Whether nothing more will happen to it. */
  public boolean ended() {
    return switch (this) {
      case DONE, SHORTENED, REFUSED, FAILED, WITHDRAWN -> true;
      case WAITING, READY, RUNNING, HELD -> false;
    };
  }

  /** Whether what comes after it may begin. */
  public boolean satisfies() {
    return this == DONE || this == SHORTENED;
  }

  /** The state's name for people. */
  public String text() {
    return name().toLowerCase(Locale.ROOT);
  }
}
