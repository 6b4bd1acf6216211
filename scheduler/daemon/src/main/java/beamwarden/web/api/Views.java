package beamwarden.web.api;

import beamwarden.answer.JobsAnswer;
import beamwarden.answer.ProgressAnswer;
import beamwarden.ledger.Recorded;
import beamwarden.report.JobProgress;
import beamwarden.report.NightNow;
import beamwarden.report.Progress;
import beamwarden.run.Desk;
import beamwarden.run.RunState;
import java.time.Instant;
import java.util.List;

/** What a run looks like just now. */
public final class Views {
  private final Desk desk;

  /** The views of a run. */
  public Views(Desk desk) {
    this.desk = desk;
  }

  /** Where all jobs stand, and the number of the last entry by which they do. */
  public JobsAnswer jobs() {
    RunState state = desk.state();
    return new JobsAnswer(
        state.books().entries(), progress(state).jobs().stream().map(ProgressAnswer::of).toList());
  }

  Progress progress(RunState state) {
    Instant now = desk.now();
    boolean open = desk.setup().calendar().current(now).isPresent();
    return new Progress(state.books(), state.exposing(), now, open);
  }

  List<JobProgress> jobs(RunState state) {
    return progress(state).jobs();
  }

  NightNow now(RunState state) {
    return NightNow.of(state, desk.setup(), desk.now());
  }

  /** The entries up to those by which a state stands. */
  List<Recorded> entries(RunState state) {
    long last = state.books().entries();
    return desk.entriesAfter(0, Integer.MAX_VALUE).stream()
        .filter(recorded -> recorded.number() <= last)
        .toList();
  }
}
