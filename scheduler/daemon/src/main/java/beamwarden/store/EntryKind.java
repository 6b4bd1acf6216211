package beamwarden.store;

import beamwarden.ledger.Entry;
import java.util.Optional;

/**
 * The kinds of entries and the names under which they are stored.
 *
 * <p>A name is never changed and never used again for something else: old books hold it for ever. A
 * class may be renamed freely.
 */
enum EntryKind {
  FENCE_RAISED("fence-raised", Entry.FenceRaised.class),
  QUEUE_SUBMITTED("queue-submitted", Entry.QueueSubmitted.class),
  SAMPLE_DECLARED("sample-declared", Entry.SampleDeclared.class),
  JOB_CHANGED("job-changed", Entry.JobChanged.class),
  JOB_TRIMMED("job-trimmed", Entry.JobTrimmed.class),
  JOB_FAULTED("job-faulted", Entry.JobFaulted.class),
  GRANT_OPENED("grant-opened", Entry.GrantOpened.class),
  GRANT_BOOKED("grant-booked", Entry.GrantBooked.class),
  GRANT_VOIDED("grant-voided", Entry.GrantVoided.class),
  GRANT_PRESUMED("grant-presumed", Entry.GrantPresumed.class),
  CURRENT_MEASURED("current-measured", Entry.CurrentMeasured.class),
  SESSION_SEEN("session-seen", Entry.SessionSeen.class),
  APPROVED("approved", Entry.Approved.class),
  NOTED("noted", Entry.Noted.class);

  private final String text;
  private final Class<? extends Entry> type;

  EntryKind(String text, Class<? extends Entry> type) {
    this.text = text;
    this.type = type;
  }

  /** The name under which it is stored. */
  String text() {
    return text;
  }

  Class<? extends Entry> type() {
    return type;
  }

  static EntryKind of(Entry entry) {
    for (EntryKind kind : values()) {
      if (kind.type == entry.getClass()) {
        return kind;
      }
    }
    throw new IllegalStateException(entry.getClass() + " has no name in the store");
  }

  static Optional<EntryKind> named(String text) {
    for (EntryKind kind : values()) {
      if (kind.text.equals(text)) {
        return Optional.of(kind);
      }
    }
    return Optional.empty();
  }
}
