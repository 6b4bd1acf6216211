package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Mosaic;
import beamwarden.dose.CapVerdict;
import beamwarden.dose.Caps;
import beamwarden.dose.Deliveries;
import beamwarden.dose.Delivery;
import beamwarden.dose.Done;
import beamwarden.dose.Exposures;
import beamwarden.dose.JobDose;
import beamwarden.dose.SampleDose;
import beamwarden.dose.Trim;
import beamwarden.instrument.Abilities;
import beamwarden.profile.Profile;
import beamwarden.queue.Acquisition;
import beamwarden.queue.AtCap;
import beamwarden.queue.Job;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/** The overnight example holds what its comments say, by the same rules that a check uses. */
class OvernightExampleTest {
  private static final Profile NORTH_ROOM =
      ProfileDocuments.read(Samples.EXAMPLES.resolve("north-room.yaml")).value().orElseThrow();
  private static final Abilities ABILITIES = NORTH_ROOM.abilities();
  private static final Queue QUEUE =
      QueueDocuments.read(Samples.EXAMPLES.resolve("02-overnight.yaml"), NORTH_ROOM)
          .value()
          .orElseThrow();
  private static final String TRIMMED = "grain-yield";

  private static final long NUMBERS_PER_JOB = 1_000_000;

  private long asked;

  @Test
  void everyJobFitsItsCapsAfterAllBeforeItAndOneIsTrimmedToHalfItsFrames() {
    Map<String, SampleDose> doses = new HashMap<>();
    for (Job job : QUEUE.jobs()) {
      Sample sample = sample(job);
      SampleDose before = doses.getOrDefault(sample.id(), SampleDose.nothing(sample.placement()));
      boolean fits = fits(sample, before, planned(job, Optional.empty()));
      assertEquals(!job.id().equals(TRIMMED), fits, job.id());
      Optional<Trim> cut = fits ? Optional.empty() : trimmed(job, before);
      List<Delivery> asked = planned(job, cut);
      assertTrue(fits(sample, before, asked), job.id());
      doses.put(sample.id(), before.plus(asked));
    }
  }

  private Optional<Trim> trimmed(Job job, SampleDose before) {
    assertEquals(AtCap.TRIM, job.atCap());
    Optional<Trim> cut =
        JobDose.trim(job, sample(job), before, ABILITIES, job.beam().current(), Done.NOTHING);
    assertEquals(Optional.of(new Trim(300, 16)), cut);
    assertEquals(32, Exposures.passes(job));
    return cut;
  }

  private static boolean fits(Sample sample, SampleDose before, List<Delivery> asked) {
    return Caps.admit(sample, before, asked) instanceof CapVerdict.Admitted;
  }

  /** All that a job would give, under numbers that no other job has. */
  private List<Delivery> planned(Job job, Optional<Trim> cut) {
    long first = NUMBERS_PER_JOB * asked++;
    return Deliveries.whole(job, sample(job), ABILITIES, job.beam().current(), Done.NOTHING, cut)
        .stream()
        .map(delivery -> numberedFrom(first, delivery))
        .toList();
  }

  private static Delivery numberedFrom(long first, Delivery planned) {
    return new Delivery(
        first + Math.abs(planned.grant()),
        first + Math.abs(planned.stay()),
        planned.exposure(),
        planned.unitsTouched(),
        planned.bestBeamOn(),
        planned.upperBeamOn(),
        planned.bestCurrent(),
        planned.upperCurrent(),
        planned.tolerances());
  }

  @Test
  void theBeamIsOnForMostOfANightInAFewHundredExposuresOfEachJob() {
    Duration beamOn = Duration.ZERO;
    int exposures = 0;
    for (Job job : QUEUE.jobs()) {
      Optional<Trim> cut =
          job.id().equals(TRIMMED) ? Optional.of(new Trim(300, 16)) : Optional.empty();
      var work = Exposures.remaining(job, ABILITIES, Done.NOTHING, cut);
      beamOn = beamOn.plus(work.beamOn());
      exposures += work.exposures();
    }
    assertTrue(beamOn.compareTo(Duration.ofHours(6)) > 0, beamOn.toString());
    assertTrue(beamOn.compareTo(Duration.ofHours(8)) < 0, beamOn.toString());
    assertTrue(exposures <= 1_000, "exposures: " + exposures);
  }

  @Test
  void theDataAreSmall() {
    long pixels =
        QUEUE.jobs().stream()
            .filter(job -> job.acquisition() instanceof Acquisition.Raster)
            .mapToLong(OvernightExampleTest::pixels)
            .sum();
    assertTrue(pixels < 15_000_000, "pixels: " + pixels);
  }

  private static long pixels(Job job) {
    Acquisition.Raster raster = (Acquisition.Raster) job.acquisition();
    long tiles = job.region() instanceof Mosaic mosaic ? mosaic.tiles().size() : 1;
    long passes = tiles * raster.frames() * raster.filters().size();
    return passes * raster.columns() * raster.rows();
  }

  @Test
  void threeModesAndThreeSamplesAreAtWork() {
    assertEquals(3, QUEUE.jobs().stream().map(job -> job.acquisition().mode()).distinct().count());
    assertEquals(3, QUEUE.jobs().stream().map(Job::sample).distinct().count());
  }

  private static Sample sample(Job job) {
    return QUEUE.samples().stream()
        .filter(sample -> sample.id().equals(job.sample()))
        .findFirst()
        .orElseThrow();
  }
}
