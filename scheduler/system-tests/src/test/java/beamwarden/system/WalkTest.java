package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.MemoryJournal;
import beamwarden.ledger.Recorded;
import beamwarden.ledger.SampleRecord;
import beamwarden.plan.Walk;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Job;
import beamwarden.queue.Queue;
import beamwarden.run.Event;
import beamwarden.run.Rehearsal;
import beamwarden.run.RunSetup;
import beamwarden.simulated.DeliveredRecord;
import beamwarden.simulated.Hardware;
import beamwarden.simulated.Notes;
import beamwarden.simulated.SimulatedInstrument;
import beamwarden.simulated.Simulation;
import beamwarden.timing.VirtualTime;
import java.time.Duration;
import java.time.Instant;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalLong;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** What is said beforehand is what happens: the walk against a rehearsal without any chance. */
class WalkTest {
  private static final double SUMMED_IN_ANOTHER_ORDER = 1e-12;
  private static final Duration ROUNDING = Duration.ofNanos(1000);

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12})
  void aRehearsalWithoutNoiseReproducesTimesAndDoses(long seed) {
    Queue queue = withoutStopRules(new RandomQueue(seed, seed % 2 == 0).draw(3, 8));
    RunSetup setup = Lab.setup();
    Books handedIn = Walk.with(Books.EMPTY, queue, Lab.AFTERNOON);
    Walk.Result walked =
        Walk.of(Lab.abilities(), setup.calendar(), setup.planner(), handedIn, Lab.AFTERNOON);
    List<Recorded> recorded = rehearse(queue, setup);
    Books rehearsed = Books.of(recorded);
    Map<String, Instant> ends = ends(recorded);
    for (JobRecord job : rehearsed.jobs()) {
      String id = job.job().id();
      assertEquals(
          walked.books().job(id).orElseThrow().state(), job.state(), "seed " + seed + " " + id);
      if (walked.visits().containsKey(id)) {
        Duration apart = Duration.between(walked.visits().get(id).ends(), ends.get(id)).abs();
        assertTrue(apart.compareTo(ROUNDING) < 0, "seed " + seed + " " + id + " " + apart);
      }
    }
    for (SampleRecord sample : rehearsed.samples()) {
      double coulombs = sample.dose().best().coulombs();
      assertEquals(
          walked.books().sample(sample.sample().id()).orElseThrow().dose().best().coulombs(),
          coulombs,
          coulombs * SUMMED_IN_ANOTHER_ORDER,
          "seed " + seed);
    }
  }

  private static List<Recorded> rehearse(Queue queue, RunSetup setup) {
    VirtualTime time = new VirtualTime(Lab.AFTERNOON);
    MemoryJournal journal = new MemoryJournal(Lab.STORE);
    Hardware hardware =
        Hardware.inMemory(
            Lab.abilities(),
            Simulation.inMemory(1).withoutNoise(),
            time,
            DeliveredRecord.inMemory());
    SimulatedInstrument instrument = new SimulatedInstrument(hardware, Notes.inMemory());
    Rehearsal rehearsal =
        new Rehearsal(setup, Lab.abilities().instrument(), journal, instrument, time);
    rehearsal.ask(new Event.Wish.Submit(queue, ""));
    rehearsal.start();
    rehearsal.runUntilDone(Lab.AFTERNOON.plus(Duration.ofDays(10)));
    return journal.read();
  }

  /** When the last receipt of each job came in. */
  private static Map<String, Instant> ends(List<Recorded> recorded) {
    Map<String, Instant> ends = new HashMap<>();
    for (Recorded one : recorded) {
      if (one.entry() instanceof Entry.GrantBooked booked) {
        ends.put(booked.delivered().exposure().job(), one.at());
      }
    }
    return ends;
  }

  /** A walk does not know how many coincidences will come. */
  private static Queue withoutStopRules(Queue queue) {
    List<Job> jobs = queue.jobs().stream().map(WalkTest::withoutStopRule).toList();
    return new Queue(queue.name(), queue.samples(), jobs);
  }

  private static Job withoutStopRule(Job job) {
    if (!(job.acquisition() instanceof Acquisition.Spot spot)) {
      return job;
    }
    return new Job(
        job.id(),
        job.sample(),
        new Acquisition.Spot(spot.mode(), spot.longest(), OptionalLong.empty()),
        job.region(),
        job.beam(),
        job.priority(),
        job.after(),
        job.atCap(),
        job.earliest(),
        job.deadline());
  }
}
