package beamwarden.run;

import java.time.Instant;

/**
 * The heartbeats.
 *
 * @param sent the number of the last one sent; 0 before the first
 * @param sentAt when it was sent
 * @param seen the number of the last one that the instrument answered; 0 before the first
 * @param seenAt when its answer came: the instrument received it no later
 */
record Beat(long sent, Instant sentAt, long seen, Instant seenAt) {
  static final Beat NONE = new Beat(0, Instant.MIN, 0, Instant.MIN);

  Beat next(Instant now) {
    return new Beat(sent + 1, now, seen, seenAt);
  }

  Beat answered(long number, Instant now) {
    return number > seen ? new Beat(sent, sentAt, number, now) : this;
  }

  boolean answered() {
    return seen > 0;
  }
}
