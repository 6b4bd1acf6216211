package beamwarden.answer;

import beamwarden.document.Problem;
import beamwarden.instrument.Abilities;
import beamwarden.plan.JobCheck;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.util.List;

/**
 * What a check says of a queue.
 *
 * @param ok whether the documents can be used and every job is done, whole or trimmed
 * @param jobs what it says of each job
 * @param problems the problems of the documents
 */
public record CheckAnswer(
    @JsonProperty("ok") boolean ok,
    @JsonProperty("jobs") List<JobCheckAnswer> jobs,
    @JsonProperty("problems") List<ProblemAnswer> problems) {
  /**
   * The answer that says what a check does.
   *
   * @param checks what it says of each job; empty when the documents cannot be used
   * @param problems the problems of the documents
   * @param abilities what the instrument can do
   */
  public static CheckAnswer of(List<JobCheck> checks, List<Problem> problems, Abilities abilities) {
    return new CheckAnswer(
        checks.stream().allMatch(CheckAnswer::done),
        checks.stream().map(check -> JobCheckAnswer.of(check, abilities)).toList(),
        problems.stream().map(ProblemAnswer::of).toList());
  }

  /** The answer when the documents cannot be used. */
  public static CheckAnswer unusable(List<Problem> problems) {
    return new CheckAnswer(false, List.of(), problems.stream().map(ProblemAnswer::of).toList());
  }

  private static boolean done(JobCheck check) {
    return switch (check.verdict()) {
      case FITS, TRIMMED -> true;
      case REFUSED, HELD -> false;
    };
  }
}
