package beamwarden.ledger;

import beamwarden.beam.Exposure;
import beamwarden.beam.RasterScan;
import beamwarden.dose.Done;
import beamwarden.dose.Trim;
import beamwarden.instrument.Receipt;
import beamwarden.queue.Acquisition;
import beamwarden.queue.HeldFor;
import beamwarden.queue.Job;
import beamwarden.queue.JobState;
import java.time.Instant;
import java.util.HashMap;
import java.util.Map;
import java.util.Optional;

/**
 * What the books know of one job.
 *
 * @param job the job
 * @param place its place among all jobs ever submitted, from 0 on
 * @param state where it stands
 * @param heldFor what it waits for, when it is held
 * @param because why it is in that state; may be empty
 * @param letGoOn whether a person let it go on although a job before it ended undone
 * @param personToo whether a person holds it besides what else it waits for
 * @param done how much of it is done
 * @param trim to what it was cut, if it was
 * @param trimmedBecause what its caps left when it was cut; empty when it was not
 * @param coincidences coincidences counted so far, by pass
 * @param exposures how many receipts were booked for it
 * @param faultsInARow how many exposures in a row ended with a fault
 * @param started when its first grant was stored
 * @param ended when it ended
 */
public record JobRecord(
    Job job,
    int place,
    JobState state,
    Optional<HeldFor> heldFor,
    String because,
    boolean letGoOn,
    boolean personToo,
    Done done,
    Optional<Trim> trim,
    String trimmedBecause,
    Map<Integer, Long> coincidences,
    int exposures,
    int faultsInARow,
    Optional<Instant> started,
    Optional<Instant> ended) {
  /** The name under which a receipt counts coincidences. */
  public static final String COINCIDENCES = "coincidences";

  /** Copies the map. */
  public JobRecord {
    coincidences = Map.copyOf(coincidences);
  }

  static JobRecord submitted(Job job, int place) {
    return new JobRecord(
        job,
        place,
        JobState.WAITING,
        Optional.empty(),
        "",
        false,
        false,
        Done.NOTHING,
        Optional.empty(),
        "",
        Map.of(),
        0,
        0,
        Optional.empty(),
        Optional.empty());
  }

  /** A person's hold stays beside what else a job waits for, and is what is left of both. */
  JobRecord changed(Entry.JobChanged change, Instant at) {
    boolean byPerson = change.heldFor().equals(Optional.of(HeldFor.A_PERSON));
    if (byPerson && heldFor.filter(what -> what != HeldFor.A_PERSON).isPresent()) {
      return in(state, heldFor, because, letGoOn, true, ended);
    }
    if (change.state() == JobState.WAITING && personToo) {
      return in(
          JobState.HELD, Optional.of(HeldFor.A_PERSON), "a person holds it", letGoOn, false, ended);
    }
    return in(
        change.state(),
        change.heldFor(),
        change.because(),
        letGoOn || letsGoOn(change),
        personToo,
        change.state().ended() ? Optional.of(at) : Optional.empty());
  }

  private JobRecord in(
      JobState newState,
      Optional<HeldFor> newHeldFor,
      String newBecause,
      boolean newLetGoOn,
      boolean newPersonToo,
      Optional<Instant> newEnded) {
    return new JobRecord(
        job,
        place,
        newState,
        newHeldFor,
        newBecause,
        newLetGoOn,
        newPersonToo,
        done,
        trim,
        trimmedBecause,
        coincidences,
        exposures,
        newState == JobState.WAITING ? 0 : faultsInARow,
        started,
        newEnded);
  }

  private boolean letsGoOn(Entry.JobChanged change) {
    return change.state() == JobState.WAITING && heldFor.equals(Optional.of(HeldFor.PREDECESSOR));
  }

  JobRecord trimmed(Entry.JobTrimmed cut) {
    return new JobRecord(
        job,
        place,
        state,
        heldFor,
        because,
        letGoOn,
        personToo,
        done,
        Optional.of(cut.to()),
        cut.because(),
        coincidences,
        exposures,
        faultsInARow,
        started,
        ended);
  }

  JobRecord granted(Instant at) {
    return with(done, coincidences, exposures, faultsInARow, Optional.of(started.orElse(at)));
  }

  /**
   * Progress counts only where it goes on from what is done: a receipt that is learnt late, after
   * its lines were exposed once more, adds dose and nothing else.
   */
  JobRecord received(Exposure exposure, Receipt receipt) {
    int pass = exposure.pass();
    boolean goesOn =
        !(exposure.scan() instanceof RasterScan raster) || raster.firstRow() == done.units(pass);
    Map<Integer, Long> counted = new HashMap<>(coincidences);
    counted.merge(pass, receipt.counts().getOrDefault(COINCIDENCES, 0L), Long::sum);
    return with(
        goesOn ? done.plus(pass, receipt.unitsDone()) : done,
        counted,
        exposures + 1,
        receipt.fault().isPresent() ? faultsInARow + 1 : 0,
        started);
  }

  JobRecord faulted() {
    return with(done, coincidences, exposures, faultsInARow + 1, started);
  }

  /** Whether a count that ends with enough coincidences has enough at a point. */
  public boolean enough(int pass) {
    return enough(pass, 0);
  }

  /** The same, with coincidences that are not booked yet. */
  public boolean enough(int pass, long more) {
    return job.acquisition() instanceof Acquisition.Spot spot
        && spot.coincidences().isPresent()
        && coincidences.getOrDefault(pass, 0L) + more >= spot.coincidences().getAsLong();
  }

  /** What is done, with the points that have enough coincidences taken as whole. */
  public Done effectiveDone() {
    Done whole = done;
    for (int pass : coincidences.keySet()) {
      if (enough(pass)) {
        long all = ((Acquisition.Spot) job.acquisition()).longest().toNanos();
        whole = whole.plus(pass, Math.max(0, all - whole.units(pass)));
      }
    }
    return whole;
  }

  private JobRecord with(
      Done newDone,
      Map<Integer, Long> newCoincidences,
      int newExposures,
      int newFaults,
      Optional<Instant> newStarted) {
    return new JobRecord(
        job,
        place,
        state,
        heldFor,
        because,
        letGoOn,
        personToo,
        newDone,
        trim,
        trimmedBecause,
        newCoincidences,
        newExposures,
        newFaults,
        newStarted,
        ended);
  }
}
