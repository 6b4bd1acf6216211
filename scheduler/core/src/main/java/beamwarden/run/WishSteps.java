package beamwarden.run;

import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.SampleRecord;
import beamwarden.queue.HeldFor;
import beamwarden.queue.Job;
import beamwarden.queue.JobState;
import beamwarden.queue.Sample;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** What people ask of a run. Each wish is on disk before it is answered. */
final class WishSteps {
  private final RunSetup setup;

  WishSteps(RunSetup setup) {
    this.setup = setup;
  }

  void take(Turn turn, Event.Asked asked) {
    Event.Wish wish = asked.wish();
    Optional<String> refusal;
    if (wish instanceof Event.Wish.Submit submit) {
      refusal = submit(turn, submit);
    } else if (wish instanceof Event.Wish.Hold hold) {
      refusal = hold(turn, hold.jobs());
    } else if (wish instanceof Event.Wish.Release release) {
      refusal = release(turn, release);
    } else if (wish instanceof Event.Wish.Withdraw withdraw) {
      refusal = withdraw(turn, withdraw.jobs());
    } else if (wish instanceof Event.Wish.Stop stop) {
      refusal = stop(turn, stop.when());
    } else {
      refusal = new ApproveSteps(setup).approve(turn, (Event.Wish.Approve) wish);
    }
    turn.answer(asked.number(), refusal);
  }

  private Optional<String> submit(Turn turn, Event.Wish.Submit submit) {
    List<String> known = new ArrayList<>();
    for (Job job : submit.queue().jobs()) {
      turn.books.job(job.id()).ifPresent(record -> known.add(job.id()));
    }
    if (!known.isEmpty()) {
      return Optional.of(
          "the store already has "
              + String.join(", ", known)
              + "; a job id is used once, give the new jobs other ids");
    }
    turn.write(new Entry.QueueSubmitted(submit.queue(), submit.profileHash()));
    submit.queue().samples().forEach(sample -> declare(turn, sample));
    for (Job job : submit.queue().jobs()) {
      holdNewJob(turn, job, submit.queue().samples());
    }
    return Optional.empty();
  }

  private static void declare(Turn turn, Sample sample) {
    Optional<SampleRecord> known = turn.books.sample(sample.id());
    if (known.isEmpty()) {
      Barrier.declare(turn, new Entry.SampleDeclared(sample, ""));
    } else {
      Sample tighter = Tightening.of(known.get().sample(), sample);
      if (!tighter.equals(known.get().sample())) {
        Barrier.declare(turn, new Entry.SampleDeclared(tighter, ""));
      }
    }
  }

  private static void holdNewJob(Turn turn, Job job, List<Sample> samples) {
    boolean looser =
        samples.stream()
            .filter(sample -> sample.id().equals(job.sample()))
            .anyMatch(
                sample ->
                    turn.books
                        .sample(sample.id())
                        .filter(known -> !Tightening.of(known.sample(), sample).equals(sample))
                        .isPresent());
    if (looser) {
      turn.write(
          new Entry.JobChanged(
              job.id(),
              JobState.HELD,
              Optional.of(HeldFor.APPROVAL),
              "its queue loosens what holds for sample "
                  + job.sample()
                  + "; approve "
                  + job.sample()
                  + " to take that over"));
    } else if (turn.books.unconfirmedSession().isPresent()) {
      turn.write(LinkSteps.holdForPlacements(job.id()));
    }
  }

  private Optional<String> hold(Turn turn, List<String> ids) {
    return forEach(
        turn,
        ids,
        record -> {
          boolean already =
              record.personToo() || record.heldFor().equals(Optional.of(HeldFor.A_PERSON));
          if (!already) {
            JobSteps.hold(turn, record, HeldFor.A_PERSON, "a person holds it");
          }
          return Optional.empty();
        });
  }

  private Optional<String> release(Turn turn, Event.Wish.Release release) {
    Optional<String> refusal = forEach(turn, release.jobs(), record -> release(turn, record));
    if (release.night() && turn.books.stopped().isPresent()) {
      turn.stopWish = Optional.empty();
      turn.note(What.GOES_ON, "a person let the night go on");
    }
    return refusal;
  }

  private static Optional<String> release(Turn turn, JobRecord record) {
    Optional<HeldFor> held = record.heldFor();
    boolean byHand =
        held.equals(Optional.of(HeldFor.A_PERSON)) || held.equals(Optional.of(HeldFor.PREDECESSOR));
    if (!byHand) {
      return held.map(what -> needsApproval(record, record.because()));
    }
    JobSteps.goOn(turn, record, "released");
    return turn.books.unconfirmedSession().map(session -> needsApproval(record, LinkSteps.TOUCHED));
  }

  private static String needsApproval(JobRecord record, String because) {
    return record.job().id() + " needs approve: " + because;
  }

  private Optional<String> withdraw(Turn turn, List<String> ids) {
    return forEach(
        turn,
        ids,
        record -> {
          JobSteps.change(turn, record, JobState.WITHDRAWN, "a person took it back");
          return Optional.empty();
        });
  }

  private Optional<String> stop(Turn turn, StopWhen when) {
    turn.stopWish = Optional.of(when);
    boolean sooner = turn.current.filter(Slot::stopping).isPresent() && when == StopWhen.NOW;
    if (sooner) {
      turn.current = turn.current.map(slot -> slot.asStopping(StopWhen.NOW));
      turn.send(new Command.StopExposure(StopWhen.NOW));
    }
    turn.note(What.STOPPED, "a person stopped the night; release --all lets it go on");
    return Optional.empty();
  }

  /** What is done with one job; one sentence when it cannot be done. */
  private interface Action {
    Optional<String> on(JobRecord record);
  }

  /** Acts on each job named; refuses, before anything is written, when one is unknown or ended. */
  private static Optional<String> forEach(Turn turn, List<String> ids, Action action) {
    List<JobRecord> records = new ArrayList<>();
    for (String id : ids) {
      Optional<JobRecord> record = turn.books.job(id);
      if (record.isEmpty()) {
        return Optional.of("there is no job " + id + "; watch lists them");
      }
      if (record.get().state().ended()) {
        return Optional.of(id + " is " + record.get().state().text() + " already");
      }
      records.add(record.get());
    }
    Optional<String> refusal = Optional.empty();
    for (JobRecord record : records) {
      Optional<String> one = action.on(record);
      refusal = refusal.isPresent() ? refusal : one;
    }
    return refusal;
  }
}
