package beamwarden.plan;

import beamwarden.beam.Exposure;
import beamwarden.dose.CapVerdict;
import beamwarden.dose.Caps;
import beamwarden.dose.Deliveries;
import beamwarden.dose.Delivery;
import beamwarden.dose.Receiving;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Receipt;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.Recorded;
import beamwarden.ledger.SampleRecord;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import beamwarden.shift.Shift;
import beamwarden.shift.ShiftCalendar;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * Says when things happen: walks the jobs through the coming shifts, exposure by exposure, by the
 * very rules of the run ({@link Settling}, {@link Fitting}) on an instrument that does as its
 * profile says.
 *
 * <p>What the walk exposes is booked in books of its own, so caps and predecessors bind as they
 * will.
 */
public final class Walk {
  /** How many shifts are walked before what is left is said not to fit. */
  public static final int SHIFTS_MOST = 60;

  private static final String SESSION = "walked";

  private final Abilities abilities;
  private final ShiftCalendar calendar;
  private final Planner planner;
  private final Settling settling;
  private final Fitting fitting;
  private final Map<String, Visit> visits = new LinkedHashMap<>();
  private Books books;
  private Instant now;
  private Readiness at;
  private long stay;

  /**
   * When a job is exposed.
   *
   * @param starts when the instrument first turns to it
   * @param ends when its last exposure ends
   * @param shift when the shift of its first exposure opens
   * @param setUp preparations and readings for it
   * @param exposing its exposures
   * @param exposures how many
   */
  public record Visit(
      Instant starts,
      Instant ends,
      Instant shift,
      Duration setUp,
      Duration exposing,
      int exposures) {}

  /**
   * Where a walk ends.
   *
   * @param books the books as they will be
   * @param visits when each job is exposed, by its id, in the order of their first exposures
   */
  public record Result(Books books, Map<String, Visit> visits) {
    /** Copies the map. */
    public Result {
      visits = new LinkedHashMap<>(visits);
    }
  }

  private Walk(
      Abilities abilities, ShiftCalendar calendar, Planner planner, Books books, Instant from) {
    this.at = Readiness.inTheMiddle(abilities.stage());
    this.abilities = abilities;
    this.calendar = calendar;
    this.planner = planner;
    this.settling = new Settling(abilities);
    this.fitting = new Fitting(abilities);
    this.books = books;
    this.now = from;
  }

  /** Walks all jobs of some books from a moment on, the stage in the middle of its range. */
  public static Result of(
      Abilities abilities, ShiftCalendar calendar, Planner planner, Books books, Instant from) {
    Walk walk = new Walk(abilities, calendar, planner, books, from);
    walk.run();
    return new Result(walk.books, walk.visits);
  }

  private void run() {
    try (Stream<Shift> shifts = calendar.from(now)) {
      shifts.limit(SHIFTS_MOST).takeWhile(shift -> !books.nothingLeft()).forEach(this::walk);
    }
  }

  private void walk(Shift shift) {
    now = now.isBefore(shift.opens()) ? shift.opens() : now;
    write(new Entry.Noted(Entry.Noted.What.SHIFT_OPENED, "walked"));
    at = at.parked();
    boolean more = true;
    while (more && now.isBefore(shift.usableEnd())) {
      more = next(shift) || waitForAJob(shift);
    }
    for (JobRecord record : books.jobs(JobState.RUNNING)) {
      write(Settling.changed(record, JobState.WAITING, "the shift closed"));
    }
  }

  /** Does the next thing; false when nothing can be done now. */
  private boolean next(Shift shift) {
    for (JobRecord record : planner.order(books.jobs(), now)) {
      Optional<Entry> due = settling.due(books, record, now);
      if (due.isPresent()) {
        write(due.get());
        return true;
      }
      if (settling.mayRun(books, record, now) && expose(record, shift)) {
        return true;
      }
    }
    return false;
  }

  /** Moves on to when the next job may start within the shift, if one may. */
  private boolean waitForAJob(Shift shift) {
    Optional<Instant> earliest =
        books.jobs().stream()
            .filter(record -> !record.state().ended())
            .flatMap(record -> record.job().earliest().stream())
            .filter(moment -> moment.isAfter(now) && moment.isBefore(shift.usableEnd()))
            .min(Instant::compareTo);
    earliest.ifPresent(moment -> now = moment);
    return earliest.isPresent();
  }

  private boolean expose(JobRecord record, Shift shift) {
    SampleRecord sample = books.sample(record.job().sample()).orElseThrow();
    Optional<Fitting.Piece> piece =
        fitting.next(
            record.job(),
            sample.sample(),
            record.effectiveDone(),
            record.trim(),
            at,
            shift,
            books.beamOnThisShift(),
            now);
    piece.ifPresent(found -> expose(record, sample, shift, found));
    return piece.isPresent();
  }

  private void expose(JobRecord record, SampleRecord sample, Shift shift, Fitting.Piece piece) {
    Exposure exposure = piece.exposure();
    Delivery inFull =
        Deliveries.planned(
            exposure,
            abilities,
            exposure.conditions().beam().current(),
            books.lastGrant() + 1,
            stay(exposure, piece));
    CapVerdict verdict = Caps.admit(sample.sample(), sample.dose(), inFull);
    if (verdict instanceof CapVerdict.Refused refused) {
      write(Settling.atCap(record, refused));
      return;
    }
    Instant begins = now;
    stay = inFull.stay();
    at = at.isAt(exposure, abilities) ? at : at.preparedFor(exposure);
    now = now.plus(piece.before());
    at = piece.reading().isZero() ? at : at.readAt(exposure.conditions().beam(), now);
    if (record.state() != JobState.RUNNING) {
      write(Settling.changed(record, JobState.RUNNING, ""));
    }
    write(new Entry.GrantOpened(inFull, inFull.upperBeamOn(), SESSION));
    now = now.plus(piece.exposing());
    write(booked(inFull));
    visit(record.job().id(), shift, piece, begins);
  }

  /** A new stretch begins when the stage moves or the current is read, as in the run. */
  private long stay(Exposure exposure, Fitting.Piece piece) {
    boolean still =
        at.stage().equals(Optional.of(exposure.stageTarget())) && piece.reading().isZero();
    return still && stay > 0 ? stay : books.lastGrant() + 1;
  }

  /** Booked as the run would: the time to blank was granted, and not used. */
  private Entry booked(Delivery inFull) {
    Receipt receipt = asGranted(inFull);
    Receiving received = Deliveries.received(inFull, receipt, abilities.meter());
    return new Entry.GrantBooked(((Receiving.Believed) received).delivered(), receipt);
  }

  private static Receipt asGranted(Delivery inFull) {
    long units = inFull.exposure().scan().units();
    return new Receipt(
        inFull.grant(),
        0,
        units,
        units,
        inFull.bestBeamOn(),
        Optional.empty(),
        Optional.empty(),
        Map.of(),
        List.of(),
        Optional.empty());
  }

  private void visit(String job, Shift shift, Fitting.Piece piece, Instant begins) {
    Visit before =
        visits.getOrDefault(
            job, new Visit(begins, begins, shift.opens(), Duration.ZERO, Duration.ZERO, 0));
    visits.put(
        job,
        new Visit(
            before.starts(),
            now,
            before.shift(),
            before.setUp().plus(piece.before()),
            before.exposing().plus(piece.exposing()),
            before.exposures() + 1));
  }

  private void write(Entry entry) {
    books = books.with(List.of(new Recorded(books.entries() + 1, now, 0, entry, "")));
  }

  /** The books as they would be with a queue handed in. */
  public static Books with(Books books, Queue queue, Instant at) {
    List<Recorded> entries = new ArrayList<>();
    long number = books.entries() + 1;
    entries.add(new Recorded(number, at, 0, new Entry.QueueSubmitted(queue, ""), ""));
    for (Sample sample : queue.samples()) {
      if (books.sample(sample.id()).isEmpty()) {
        number++;
        entries.add(new Recorded(number, at, 0, new Entry.SampleDeclared(sample, ""), ""));
      }
    }
    return books.with(entries);
  }
}
