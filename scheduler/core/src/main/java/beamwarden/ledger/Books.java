package beamwarden.ledger;

import beamwarden.beam.BeamSettings;
import beamwarden.dose.Delivery;
import beamwarden.dose.SampleDose;
import beamwarden.instrument.Receipt;
import beamwarden.queue.Job;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.Collection;
import java.util.Collections;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * Everything the entries say, taken together: what a daemon knows after reading its journal.
 *
 * <p>The books are nothing but a fold over the recorded entries, so a restart knows exactly what
 * was known before it. Immutable; {@link #with} gives the books with one entry more.
 */
public final class Books {
  /** Books without any entry. */
  public static final Books EMPTY = new Books();

  private final Map<String, SampleRecord> samples;
  private final Map<String, JobRecord> jobs;
  private final Map<Long, GrantRecord> unresolved;
  private final Map<Long, GrantRecord> sinceReading;
  private final long entries;
  private final long lastGrant;
  private final Instant lastAt;
  private final Optional<String> confirmedSession;
  private final Optional<String> unconfirmedSession;
  private final Optional<String> stopped;
  private final Optional<String> openShift;
  private final boolean handOverApproved;
  private final Duration beamOnThisShift;

  private Books() {
    this(new Builder());
  }

  private Books(Builder from) {
    samples = Collections.unmodifiableMap(from.samples);
    jobs = Collections.unmodifiableMap(from.jobs);
    unresolved = Collections.unmodifiableMap(from.unresolved);
    sinceReading = Collections.unmodifiableMap(from.sinceReading);
    entries = from.entries;
    lastGrant = from.lastGrant;
    lastAt = from.lastAt;
    confirmedSession = from.confirmedSession;
    unconfirmedSession = from.unconfirmedSession;
    stopped = from.stopped;
    openShift = from.openShift;
    handOverApproved = from.handOverApproved;
    beamOnThisShift = from.beamOnThisShift;
  }

  /** The books that all these entries make. */
  public static Books of(List<Recorded> recorded) {
    Builder builder = new Builder();
    recorded.forEach(builder::take);
    return new Books(builder);
  }

  /** These books and some entries more. */
  public Books with(List<Recorded> recorded) {
    Builder builder = new Builder(this);
    recorded.forEach(builder::take);
    return new Books(builder);
  }

  /** All samples, in the order in which they were first handed in. */
  public Collection<SampleRecord> samples() {
    return samples.values();
  }

  /** The sample of that id. */
  public Optional<SampleRecord> sample(String id) {
    return Optional.ofNullable(samples.get(id));
  }

  /** All jobs, in the order in which they were handed in. */
  public Collection<JobRecord> jobs() {
    return jobs.values();
  }

  /** The job of that id. */
  public Optional<JobRecord> job(String id) {
    return Optional.ofNullable(jobs.get(id));
  }

  /** Grants whose outcome could still be learnt from the adapter, by number. */
  public Map<Long, GrantRecord> unresolved() {
    return unresolved;
  }

  /** Grants booked since the last reading under their settings, by number: one may raise them. */
  public Map<Long, GrantRecord> sinceReading() {
    return sinceReading;
  }

  /** How many entries there are. */
  public long entries() {
    return entries;
  }

  /** The highest number any grant ever had; 0 when there was none. */
  public long lastGrant() {
    return lastGrant;
  }

  /** When the last entry was stored. */
  public Instant lastAt() {
    return lastAt;
  }

  /** The chamber session in which a person vouches for holder and placements. */
  public Optional<String> confirmedSession() {
    return confirmedSession;
  }

  /** A chamber session that was seen since, and that nobody has confirmed. */
  public Optional<String> unconfirmedSession() {
    return unconfirmedSession;
  }

  /** Why the night is stopped, if it is. */
  public Optional<String> stopped() {
    return stopped;
  }

  /** What was noted of the shift that is open, if one is. */
  public Optional<String> openShift() {
    return openShift;
  }

  /** Whether a person approved that this store takes over an instrument bound to another one. */
  public boolean handOverApproved() {
    return handOverApproved;
  }

  /** How long the beam was on, at most, since the last shift opened. */
  public Duration beamOnThisShift() {
    return beamOnThisShift;
  }

  /** A working copy that takes entries one by one. */
  private static final class Builder {
    private final Map<String, SampleRecord> samples;
    private final Map<String, JobRecord> jobs;
    private final Map<Long, GrantRecord> unresolved;
    private final Map<Long, GrantRecord> sinceReading;
    private long entries;
    private long lastGrant;
    private Instant lastAt = Instant.MIN;
    private Optional<String> confirmedSession = Optional.empty();
    private Optional<String> unconfirmedSession = Optional.empty();
    private Optional<String> stopped = Optional.empty();
    private Optional<String> openShift = Optional.empty();
    private boolean handOverApproved;
    private Duration beamOnThisShift = Duration.ZERO;

    Builder() {
      samples = new LinkedHashMap<>();
      jobs = new LinkedHashMap<>();
      unresolved = new LinkedHashMap<>();
      sinceReading = new HashMap<>();
    }

    Builder(Books books) {
      samples = new LinkedHashMap<>(books.samples);
      jobs = new LinkedHashMap<>(books.jobs);
      unresolved = new LinkedHashMap<>(books.unresolved);
      sinceReading = new HashMap<>(books.sinceReading);
      entries = books.entries;
      lastGrant = books.lastGrant;
      lastAt = books.lastAt;
      confirmedSession = books.confirmedSession;
      unconfirmedSession = books.unconfirmedSession;
      stopped = books.stopped;
      openShift = books.openShift;
      handOverApproved = books.handOverApproved;
      beamOnThisShift = books.beamOnThisShift;
    }

    void take(Recorded recorded) {
      entries = recorded.number();
      lastAt = recorded.at().isAfter(lastAt) ? recorded.at() : lastAt;
      fold(recorded.entry(), recorded.at());
      samples.computeIfPresent(
          recorded.entry().chain(), (id, record) -> record.withHead(recorded.hash()));
    }

    private void fold(Entry entry, Instant at) {
      if (entry instanceof Entry.QueueSubmitted submitted) {
        submit(submitted.queue());
      } else if (entry instanceof Entry.SampleDeclared declared) {
        declare(declared.sample());
      } else if (entry instanceof Entry.JobChanged changed) {
        jobs.computeIfPresent(changed.job(), (id, record) -> record.changed(changed, at));
      } else if (entry instanceof Entry.JobTrimmed trimmed) {
        jobs.computeIfPresent(trimmed.job(), (id, record) -> record.trimmed(trimmed));
      } else if (entry instanceof Entry.JobFaulted faulted) {
        jobs.computeIfPresent(faulted.job(), (id, record) -> record.faulted());
      } else if (entry instanceof Entry.GrantOpened opened) {
        open(opened, at);
      } else if (entry instanceof Entry.GrantBooked booked) {
        book(booked);
      } else if (entry instanceof Entry.GrantPresumed presumed) {
        presume(presumed);
      } else if (entry instanceof Entry.GrantVoided voided) {
        makeVoid(voided);
      } else {
        foldNight(entry);
      }
    }

    private void foldNight(Entry entry) {
      if (entry instanceof Entry.CurrentMeasured measured) {
        BeamSettings settings = measured.reading().settings();
        sinceReading
            .values()
            .removeIf(record -> record.opened().exposure().conditions().beam().equals(settings));
      } else if (entry instanceof Entry.SessionSeen seen) {
        see(seen);
      } else if (entry instanceof Entry.Approved approved) {
        approve(approved.thing());
      } else if (entry instanceof Entry.Noted noted) {
        note(noted);
      }
    }

    private void submit(Queue queue) {
      for (Sample sample : queue.samples()) {
        samples.computeIfPresent(
            sample.id(),
            (id, known) ->
                known.sample().equals(sample) ? known : known.asking(Optional.of(sample)));
      }
      for (Job job : queue.jobs()) {
        jobs.put(job.id(), JobRecord.submitted(job, jobs.size()));
      }
    }

    private void declare(Sample sample) {
      SampleRecord known = samples.get(sample.id());
      samples.put(
          sample.id(),
          known == null
              ? new SampleRecord(
                  sample, Optional.empty(), SampleDose.nothing(sample.placement()), "")
              : known.declared(sample));
    }

    private void open(Entry.GrantOpened opened, Instant at) {
      lastGrant = Math.max(lastGrant, opened.grant());
      handOverApproved = false; // It was used: grants are given again.
      unresolved.put(
          opened.grant(),
          new GrantRecord(opened, GrantState.OPEN, opened.inFull(), Optional.empty()));
      samples.computeIfPresent(
          opened.chain(), (id, record) -> record.with(record.dose().plus(opened.inFull())));
      jobs.computeIfPresent(opened.exposure().job(), (id, record) -> record.granted(at));
    }

    private void book(Entry.GrantBooked booked) {
      Receipt receipt = booked.receipt();
      GrantRecord before = unresolved.remove(receipt.grant());
      if (before != null) {
        countBeam(before, booked.delivered());
        jobs.computeIfPresent(
            booked.delivered().exposure().job(),
            (id, record) -> record.received(booked.delivered().exposure(), receipt));
        sinceReading.put(
            receipt.grant(),
            new GrantRecord(
                before.opened(), GrantState.BOOKED, booked.delivered(), Optional.of(receipt)));
      }
      replace(booked.chain(), receipt.grant(), booked.delivered());
    }

    /** What was presumed is counted already. */
    private void countBeam(GrantRecord before, Delivery delivery) {
      if (before.state() == GrantState.OPEN) {
        beamOnThisShift = beamOnThisShift.plus(delivery.upperBeamOn());
      }
    }

    /** An outcome that stays unknown is a try that is used up. */
    private void presume(Entry.GrantPresumed presumed) {
      long grant = presumed.atMost().grant();
      GrantRecord before = unresolved.remove(grant);
      if (before != null && presumed.receipt().isEmpty()) {
        unresolved.put(
            grant,
            new GrantRecord(
                before.opened(), GrantState.PRESUMED, presumed.atMost(), Optional.empty()));
      }
      if (before != null) {
        countBeam(before, presumed.atMost());
      }
      if (before != null && before.state() == GrantState.OPEN) {
        jobs.computeIfPresent(before.opened().exposure().job(), (id, record) -> record.faulted());
      }
      replace(presumed.chain(), grant, presumed.atMost());
    }

    private void replace(String sample, long grant, Delivery delivery) {
      samples.computeIfPresent(
          sample, (id, record) -> record.with(record.dose().replacing(grant, delivery)));
    }

    private void makeVoid(Entry.GrantVoided voided) {
      lastGrant = Math.max(lastGrant, voided.grant());
      GrantRecord before = unresolved.remove(voided.grant());
      samples.computeIfPresent(
          voided.sample(), (id, record) -> record.with(record.dose().without(voided.grant())));
      if (before != null && voided.faulted()) {
        jobs.computeIfPresent(before.opened().exposure().job(), (id, record) -> record.faulted());
      }
    }

    private void see(Entry.SessionSeen seen) {
      if (seen.first()) {
        confirmedSession = Optional.of(seen.session());
      } else {
        unconfirmedSession = Optional.of(seen.session());
      }
    }

    private void approve(String thing) {
      if (thing.equals(Entry.Approved.PLACEMENTS) && unconfirmedSession.isPresent()) {
        confirmedSession = unconfirmedSession;
        unconfirmedSession = Optional.empty();
      } else if (thing.equals(Entry.Approved.HAND_OVER)) {
        handOverApproved = true;
      }
    }

    private void note(Entry.Noted noted) {
      switch (noted.what()) {
        case STOPPED -> stopped = Optional.of(noted.text());
        case GOES_ON -> stopped = Optional.empty();
        case SHIFT_OPENED -> {
          openShift = Optional.of(noted.text());
          beamOnThisShift = Duration.ZERO;
        }
        case SHIFT_CLOSED -> openShift = Optional.empty();
        case WOUND_DOWN, FAULT -> {}
      }
    }
  }

  /** Whether every job has ended. */
  public boolean nothingLeft() {
    return jobs.values().stream().allMatch(record -> record.state().ended());
  }

  /** Jobs in a state. */
  public List<JobRecord> jobs(JobState state) {
    List<JobRecord> found = new ArrayList<>();
    jobs.values().stream().filter(record -> record.state() == state).forEach(found::add);
    return found;
  }
}
