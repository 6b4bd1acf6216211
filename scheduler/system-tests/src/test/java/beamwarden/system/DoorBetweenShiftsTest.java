package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.Entry;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.Recorded;
import beamwarden.queue.JobState;
import beamwarden.simulated.FaultPlan;
import beamwarden.simulated.Mishap;
import beamwarden.simulated.Simulation;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;

/** Somebody opens the chamber's door while no shift is open. */
class DoorBetweenShiftsTest {
  private static final FaultPlan DOOR =
      new FaultPlan() {
        @Override
        public Optional<Strike> at(Step step, long exposed) {
          return Optional.empty();
        }

        @Override
        public List<Timed> timed() {
          return List.of(new Timed(Duration.ofMinutes(5), Mishap.DOOR_OPENED));
        }
      };

  @Test
  void nothingIsGrantedBeforeAPersonHasConfirmedThePlacements() {
    NightHarness harness = nights();
    harness.run(new RandomQueue(1, false).draw(2, 3));
    List<Entry> entries = harness.recorded().stream().map(Recorded::entry).toList();
    int approved = first(entries, Entry.Approved.class);
    assertTrue(approved > first(entries, Entry.SessionSeen.class));
    assertTrue(approved < first(entries, Entry.GrantOpened.class));
  }

  private static int first(List<Entry> entries, Class<? extends Entry> kind) {
    return IntStream.range(0, entries.size())
        .filter(place -> kind.isInstance(entries.get(place)))
        .findFirst()
        .orElseThrow();
  }

  private static NightHarness nights() {
    return new NightHarness(Simulation.inMemory(1).with(DOOR), operation -> false, 1);
  }

  @Test
  void everyJobIsDoneOnceAPersonHasConfirmedThePlacements() {
    for (JobRecord job : nights().run(new RandomQueue(1, false).draw(2, 3)).jobs()) {
      assertEquals(JobState.DONE, job.state(), job.toString());
    }
  }
}
