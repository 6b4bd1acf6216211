package beamwarden.run;

import beamwarden.dose.CapVerdict;
import beamwarden.dose.JobDose;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.SampleRecord;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import beamwarden.queue.Sample;
import java.util.List;
import java.util.Optional;

/** What a person loosens or confirms; each needs a reason, and is an entry. */
final class ApproveSteps {
  /** How many caps one approval may raise, one after the other. */
  private static final int MOST_CAPS = 64;

  private final RunSetup setup;

  ApproveSteps(RunSetup setup) {
    this.setup = setup;
  }

  Optional<String> approve(Turn turn, Event.Wish.Approve approve) {
    if (approve.reason().isBlank()) {
      return Optional.of("an approval needs a reason; give it with --reason");
    }
    String thing = approve.thing();
    if (thing.equals(Entry.Approved.PLACEMENTS)) {
      return placements(turn, approve);
    }
    if (thing.equals(Entry.Approved.HAND_OVER)) {
      if (turn.link.phase() != Link.Phase.FOREIGN) {
        return Optional.of("no instrument waits to be taken over");
      }
      turn.write(new Entry.Approved(thing, approve.reason()));
      return Optional.empty();
    }
    Optional<JobRecord> job = turn.books.job(thing);
    if (job.isPresent()) {
      return raiseCaps(turn, approve, job.get());
    }
    Optional<SampleRecord> sample = turn.books.sample(thing);
    if (sample.isPresent()) {
      return adopt(turn, approve, sample.get());
    }
    return Optional.of(
        "there is nothing called "
            + thing
            + " to approve; name a job, a sample, placements or hand-over");
  }

  private static Optional<String> placements(Turn turn, Event.Wish.Approve approve) {
    if (turn.books.unconfirmedSession().isEmpty()) {
      return Optional.of("no placement waits to be confirmed");
    }
    turn.write(new Entry.Approved(approve.thing(), approve.reason()));
    for (JobRecord record : held(turn, HeldFor.PLACEMENTS)) {
      JobSteps.change(turn, record, JobState.WAITING, "approved");
    }
    return Optional.empty();
  }

  private static Optional<String> adopt(
      Turn turn, Event.Wish.Approve approve, SampleRecord record) {
    Optional<Sample> asked = record.asked();
    if (asked.isEmpty()) {
      return Optional.of("no change of sample " + approve.thing() + " waits to be approved");
    }
    turn.write(new Entry.Approved(approve.thing(), approve.reason()));
    Barrier.declare(turn, new Entry.SampleDeclared(asked.get(), approve.reason()));
    for (JobRecord job : held(turn, HeldFor.APPROVAL)) {
      if (job.job().sample().equals(approve.thing())) {
        JobSteps.goOn(turn, job, "approved");
      }
    }
    return Optional.empty();
  }

  /** A job that asked is approved by raising the caps that bind, just enough for what is left. */
  private Optional<String> raiseCaps(Turn turn, Event.Wish.Approve approve, JobRecord record) {
    if (!record.heldFor().equals(Optional.of(HeldFor.APPROVAL))) {
      return Optional.of(approve.thing() + " does not wait for an approval");
    }
    SampleRecord known = turn.books.sample(record.job().sample()).orElseThrow();
    if (known.asked().isPresent()) {
      return Optional.of(
          "its queue changes sample " + known.sample().id() + "; approve that sample");
    }
    Sample raised = known.sample();
    for (int caps = 0; caps < MOST_CAPS; caps++) {
      JobDose left =
          JobDose.of(
              record.job(),
              raised,
              setup.profile().abilities(),
              known.dose(),
              record.done(),
              record.trim());
      if (!(left.verdict() instanceof CapVerdict.Refused refused)) {
        break;
      }
      Optional<Sample> higher = Raising.of(raised, refused);
      if (higher.isEmpty()) {
        return Optional.of(
            "this cannot be approved: " + refused.because() + "; move the job elsewhere");
      }
      raised = higher.get();
    }
    turn.write(new Entry.Approved(approve.thing(), approve.reason()));
    Barrier.declare(turn, new Entry.SampleDeclared(raised, approve.reason()));
    JobSteps.goOn(turn, record, "approved: " + approve.reason());
    return Optional.empty();
  }

  private static List<JobRecord> held(Turn turn, HeldFor what) {
    return turn.books.jobs(JobState.HELD).stream()
        .filter(record -> record.heldFor().equals(Optional.of(what)))
        .toList();
  }
}
