package beamwarden.system;

import beamwarden.beam.Rectangle;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.MemoryJournal;
import beamwarden.ledger.Recorded;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.run.Event;
import beamwarden.run.Rehearsal;
import beamwarden.run.RunSetup;
import beamwarden.simulated.DeliveredRecord;
import beamwarden.simulated.Hardware;
import beamwarden.simulated.MemoryRecord;
import beamwarden.simulated.Notes;
import beamwarden.simulated.SimulatedInstrument;
import beamwarden.simulated.Simulation;
import beamwarden.simulated.Stretch;
import beamwarden.timing.VirtualTime;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.function.IntPredicate;

/**
 * Nights in virtual time: a daemon that can be killed at any operation, an adapter that can die, a
 * person who comes in the morning, and the invariants held after every event.
 */
final class NightHarness {
  /** Thrown where the daemon is killed; nobody in the program catches it. */
  private static final class Killed extends Error {
    private static final long serialVersionUID = 1L;
  }

  private static final Duration RESTARTED_AFTER = Duration.ofMinutes(2);
  private static final Duration PERSON_COMES_AFTER = Duration.ofHours(2);
  private static final Duration LONGEST = Duration.ofDays(12);

  private final RunSetup setup;
  private final VirtualTime time = new VirtualTime(Lab.AFTERNOON);
  private final MemoryRecord truth = DeliveredRecord.inMemory();
  private final RestartableInstrument instrument;
  private final IntPredicate killAt;
  private final Invariants invariants;
  private MemoryJournal journal;
  private Rehearsal daemon;
  private int operations;
  private int kills;
  private int stretchesSeen;
  private boolean personIsComing;

  /**
   * A harness.
   *
   * @param simulation how the instrument behaves
   * @param killAt whether the daemon is killed at the operation of that number
   * @param seed for the places at which dose is followed
   */
  NightHarness(Simulation simulation, IntPredicate killAt, long seed) {
    this.setup = Lab.setup();
    this.killAt = killAt;
    this.invariants = new Invariants(setup.calendar(), seed);
    Hardware hardware = Hardware.inMemory(Lab.abilities(), simulation, time, truth);
    Notes notes = Notes.inMemory();
    this.instrument =
        new RestartableInstrument(
            () -> new SimulatedInstrument(hardware, notes), this::countOperation);
    this.journal = new MemoryJournal(Lab.STORE);
  }

  private void countOperation() {
    operations++;
    if (killAt.test(operations)) {
      kills++;
      throw new Killed();
    }
  }

  /** Runs a queue to its end, through as many nights as it takes. */
  Books run(Queue queue) {
    guarded(this::startDaemon);
    submit(queue);
    Instant latest = time.instant().plus(LONGEST);
    while (!atRest() && time.instant().isBefore(latest)) {
      boolean[] moved = {false};
      guarded(() -> moved[0] = time.runNext());
      check();
      callPerson();
      if (!moved[0] && !daemonIsDown()) {
        throw new AssertionError("nothing ever happens again at " + time.instant());
      }
    }
    check();
    invariants.checkAtTheEnd(books());
    return books();
  }

  private void submit(Queue queue) {
    while (daemonIsDown() || books().jobs().isEmpty()) {
      if (daemonIsDown()) {
        time.runNext();
      } else {
        guarded(() -> daemon.ask(new Event.Wish.Submit(queue, "of tests")));
      }
    }
  }

  private void guarded(Runnable step) {
    try {
      step.run();
    } catch (Killed killed) {
      if (daemon != null) {
        daemon.abandon();
        daemon = null;
      }
      time.after(RESTARTED_AFTER, () -> guarded(this::startDaemon));
    }
    if (daemon != null && daemon.state().halted().isPresent()) {
      throw new AssertionError("halted: " + daemon.state().halted().get());
    }
  }

  private void startDaemon() {
    journal = journal.reopened();
    daemon =
        new Rehearsal(
            setup,
            Lab.abilities().instrument(),
            new CrashingJournal(journal, this::countOperation),
            instrument,
            time);
    daemon.start();
  }

  private boolean daemonIsDown() {
    return daemon == null;
  }

  private Books books() {
    return Books.of(journal.read());
  }

  private boolean atRest() {
    if (daemonIsDown()) {
      return false;
    }
    return daemon.state().books().jobs().stream().allMatch(job -> job.state().ended())
        && daemon.state().current().isEmpty();
  }

  /** A person sets right what waits for one, two hours after it was left waiting. */
  private void callPerson() {
    if (daemonIsDown() || personIsComing) {
      return;
    }
    Books now = daemon.state().books();
    boolean needed =
        now.stopped().isPresent()
            || now.unconfirmedSession().isPresent()
            || now.jobs(JobState.HELD).stream().findAny().isPresent();
    if (needed) {
      personIsComing = true;
      time.after(PERSON_COMES_AFTER, () -> guarded(this::personActs));
    }
  }

  private void personActs() {
    personIsComing = false;
    if (daemonIsDown()) {
      return;
    }
    if (daemon.state().books().unconfirmedSession().isPresent()) {
      daemon.ask(new Event.Wish.Approve(Entry.Approved.PLACEMENTS, "looked, all in place"));
    }
    List<String> held = new ArrayList<>();
    for (JobRecord job : daemon.state().books().jobs(JobState.HELD)) {
      boolean byHand =
          job.heldFor()
              .filter(what -> what == HeldFor.A_PERSON || what == HeldFor.PREDECESSOR)
              .isPresent();
      if (byHand) {
        held.add(job.job().id());
      }
    }
    held.forEach(job -> daemon.ask(new Event.Wish.Withdraw(List.of(job))));
    daemon.ask(new Event.Wish.Release(List.of(), true));
  }

  private void check() {
    List<Beam> fresh = new ArrayList<>();
    for (Stretch stretch : truth.stretchesFrom(stretchesSeen)) {
      fresh.add(beam(stretch));
    }
    stretchesSeen += fresh.size();
    List<Recorded> recorded = recorded();
    invariants.check(recorded, daemonIsDown() ? Books.of(recorded) : daemon.state().books(), fresh);
  }

  private static Beam beam(Stretch stretch) {
    return new Beam(
        stretch.began(),
        stretch.ended(),
        stretch.grant().orElse(0),
        stretch.sample(),
        stretch.shape() == Stretch.Shape.SPOT,
        new Rectangle(
            stretch.centre(), stretch.widthMetres(), stretch.heightMetres(), stretch.turnDegrees()),
        stretch.electrons(),
        stretch.currentAmperes());
  }

  /** All entries, in order. */
  List<Recorded> recorded() {
    return journal.read();
  }

  /** How many operations of the daemon there were. */
  int operations() {
    return operations;
  }

  /** How often the daemon was killed. */
  int kills() {
    return kills;
  }

  /** How many faults the books note. */
  int faults() {
    return (int)
        journal.read().stream()
            .filter(
                recorded ->
                    recorded.entry() instanceof Entry.Noted noted
                        && noted.what() == Entry.Noted.What.FAULT)
            .count();
  }

  /** On how many samples the instrument left its guarantees. */
  int surges() {
    return invariants.samplesWithGuaranteesLeft();
  }

  /** How many stretches of beam there were. */
  int stretches() {
    return stretchesSeen;
  }
}
