package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.ledger.Books;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.AtCap;
import beamwarden.queue.Cap;
import beamwarden.queue.Job;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import beamwarden.simulated.FaultPlan;
import beamwarden.simulated.Mishap;
import beamwarden.simulated.Simulation;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/**
 * The daemon dies at every single operation of a small night, and the adapter at every step of it:
 * each time the invariants hold and the job ends done.
 *
 * <p>An operation is a verb to the instrument, or the moment before or after something is stored:
 * so every gap between two steps of the list in the package {@code beamwarden.ledger} is hit.
 */
class CrashEverywhereTest {
  private static final long SEED = 7;

  @Test
  void aNightSurvivesTheDaemonDyingAtEachOfItsOperations() {
    int operations = night(Simulation.inMemory(SEED), 0).operations();
    assertTrue(operations > 40, "a night of " + operations + " operations shows too little");
    for (int operation = 1; operation <= operations; operation++) {
      NightHarness harness = night(Simulation.inMemory(SEED), operation);
      assertEquals(1, harness.kills(), "at operation " + operation);
    }
    System.out.printf("the daemon died at each of %d operations%n", operations);
  }

  @Test
  void aNightSurvivesTheDaemonDyingTwiceInARow() {
    int operations = night(Simulation.inMemory(SEED), 0).operations();
    for (int operation = 1; operation <= operations; operation++) {
      int first = operation;
      NightHarness harness =
          new NightHarness(
              Simulation.inMemory(SEED), now -> now == first || now == first + 3, SEED);
      endsDone(harness.run(queue()), "at operations " + first + " and " + (first + 3));
    }
  }

  @Test
  void aNightSurvivesTheAdapterDyingAtEachOfItsSteps() {
    List<FaultPlan.Step> steps = List.of(FaultPlan.Step.values());
    for (FaultPlan.Step step : steps) {
      for (long exposed = 1; exposed <= 4; exposed++) {
        DiesOnce dies = new DiesOnce(step, exposed);
        NightHarness harness =
            new NightHarness(Simulation.inMemory(SEED).with(dies), operation -> false, SEED);
        endsDone(harness.run(queue()), "adapter died at " + step + " of exposure " + exposed);
      }
    }
  }

  private static NightHarness night(Simulation simulation, int killAt) {
    NightHarness harness = new NightHarness(simulation, operation -> operation == killAt, SEED);
    endsDone(harness.run(queue()), "killed at operation " + killAt);
    return harness;
  }

  private static void endsDone(Books books, String when) {
    assertEquals(JobState.DONE, books.job("map").orElseThrow().state(), when);
  }

  /** One job of two filters, each cut into two exposures. */
  private static Queue queue() {
    Sample sample =
        new Sample(
            "s",
            "a slab",
            Optional.empty(),
            new Placement(new Point(0, 0), 0, 1e-6),
            List.of(),
            List.of(new Cap.OnCharge(new Charge(1e-3), Optional.empty(), "")));
    Acquisition.Raster raster =
        new Acquisition.Raster(
            Mode.INTENSITY_MAP, 100, 100, Duration.ofMillis(9), List.of("violet", "red"), 1);
    Job job =
        new Job(
            "map",
            "s",
            raster,
            Rectangle.of(new Point(0, 0), 50e-6, 50e-6),
            new BeamSettings(new Voltage(8e3), new Current(350e-12)),
            5,
            List.of(),
            AtCap.REFUSE,
            Optional.empty(),
            Optional.empty());
    return new Queue("small", List.of(sample), new ArrayList<>(List.of(job)));
  }

  /** The adapter's process ends the first time a step of an exposure is reached. */
  private static final class DiesOnce implements FaultPlan {
    private final Step step;
    private final long exposed;
    private boolean died;

    DiesOnce(Step step, long exposed) {
      this.step = step;
      this.exposed = exposed;
    }

    @Override
    public Optional<Strike> at(Step now, long number) {
      if (died || now != step || number < exposed) {
        return Optional.empty();
      }
      died = true;
      return Optional.of(new Strike(Mishap.PROCESS_DIES, 0.5));
    }
  }
}
