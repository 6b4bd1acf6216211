package beamwarden.run;

import java.time.Instant;

/**
 * How the run stands with its instrument.
 *
 * @param phase how far the connection is
 * @param until when the phase has taken too long, or when it ends by itself
 * @param fence the fencing number that this run raised last
 * @param session the chamber session that it reported; empty before
 * @param doubted whether something happened since that may have ended the session
 * @param why why there is no connection; empty when there is one or none was tried
 */
record Link(Phase phase, Instant until, long fence, String session, boolean doubted, String why) {
  /** How far a connection is. */
  enum Phase {
    /** There is none; it is tried again at {@code until}. */
    OFFLINE,
    /** It was asked for. */
    CONNECTING,
    /** The instrument answered; the fence is being raised in the store. */
    FENCING,
    /** The instrument was asked to seal. */
    SEALING,
    /** It is sealed by us: grants may be sent. */
    ONLINE,
    /** It is bound to another store, or another daemon took it: a person must act. */
    FOREIGN
  }

  static Link begin(long fence) {
    return new Link(Phase.OFFLINE, Instant.MIN, fence, "", false, "");
  }

  boolean online() {
    return phase == Phase.ONLINE;
  }

  Link to(Phase next, Instant newUntil) {
    return new Link(next, newUntil, fence, session, doubted, next == Phase.ONLINE ? "" : why);
  }

  /** The connection is gone, or could not be made. */
  Link lost(String reason, Instant again) {
    return new Link(Phase.OFFLINE, again, fence, session, doubted, reason);
  }

  /** It reported a session. */
  Link reported(String reported, Instant now) {
    return new Link(Phase.FENCING, now, fence, reported, false, "");
  }

  Link sealing(long raised, Instant answerDue) {
    return new Link(Phase.SEALING, answerDue, raised, session, doubted, "");
  }

  Link inDoubt() {
    return new Link(phase, until, fence, session, true, why);
  }
}
