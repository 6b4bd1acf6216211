package beamwarden.answer;

import beamwarden.dose.Delivery;
import beamwarden.ledger.Entry;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalLong;

/**
 * What is said of an entry in short.
 *
 * @param kind what kind of entry it is
 * @param job the job it is about
 * @param grant the grant it is about
 * @param state the state a job moved to
 * @param text one sentence; may be empty
 */
record EntryWords(
    String kind, Optional<String> job, OptionalLong grant, Optional<String> state, String text) {
  static EntryWords of(Entry entry) {
    if (entry instanceof Entry.JobChanged changed) {
      return new EntryWords(
          EntryAnswer.JOB_CHANGED,
          Optional.of(changed.job()),
          OptionalLong.empty(),
          Optional.of(changed.state().text()),
          changed.because());
    }
    if (entry instanceof Entry.JobTrimmed trimmed) {
      return ofJob("job-trimmed", trimmed.job(), trimmed.because());
    }
    if (entry instanceof Entry.JobFaulted faulted) {
      return ofJob("job-faulted", faulted.job(), "");
    }
    return ofGrants(entry).orElseGet(() -> ofNight(entry));
  }

  private static Optional<EntryWords> ofGrants(Entry entry) {
    if (entry instanceof Entry.GrantOpened opened) {
      return Optional.of(ofGrant("grant-opened", opened.inFull(), ""));
    }
    if (entry instanceof Entry.GrantBooked booked) {
      return Optional.of(ofGrant("grant-booked", booked.delivered(), ""));
    }
    if (entry instanceof Entry.GrantPresumed presumed) {
      return Optional.of(ofGrant("grant-presumed", presumed.atMost(), presumed.because()));
    }
    if (entry instanceof Entry.GrantVoided voided) {
      return Optional.of(
          new EntryWords(
              "grant-voided",
              Optional.empty(),
              OptionalLong.of(voided.grant()),
              Optional.empty(),
              voided.because()));
    }
    return Optional.empty();
  }

  private static EntryWords ofNight(Entry entry) {
    if (entry instanceof Entry.Noted noted) {
      return plain(noted.what().name().toLowerCase(Locale.ROOT).replace('_', '-'), noted.text());
    }
    if (entry instanceof Entry.QueueSubmitted submitted) {
      return plain("queue-submitted", submitted.queue().name());
    }
    if (entry instanceof Entry.Approved approved) {
      return plain("approved", approved.thing() + ": " + approved.reason());
    }
    if (entry instanceof Entry.CurrentMeasured measured) {
      return plain("current-measured", measured.reading().current().toString());
    }
    if (entry instanceof Entry.SampleDeclared declared) {
      return plain("sample-declared", declared.because());
    }
    return entry instanceof Entry.FenceRaised raised
        ? plain("fence-raised", Long.toString(raised.fence()))
        : plain("session-seen", "");
  }

  private static EntryWords ofJob(String kind, String job, String text) {
    return new EntryWords(kind, Optional.of(job), OptionalLong.empty(), Optional.empty(), text);
  }

  private static EntryWords ofGrant(String kind, Delivery delivery, String text) {
    return new EntryWords(
        kind,
        Optional.of(delivery.exposure().job()),
        OptionalLong.of(delivery.grant()),
        Optional.empty(),
        text);
  }

  private static EntryWords plain(String kind, String text) {
    return new EntryWords(kind, Optional.empty(), OptionalLong.empty(), Optional.empty(), text);
  }
}
