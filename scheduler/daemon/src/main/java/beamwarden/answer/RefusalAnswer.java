package beamwarden.answer;

import com.fasterxml.jackson.annotation.JsonInclude;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.util.List;

/**
 * Why a request was not fulfilled: problem details after RFC 9457.
 *
 * @param type the address of a page that explains this kind of refusal, relative to the daemon's
 * @param title what kind of refusal it is
 * @param status the status code
 * @param detail what was refused, and what to do, in one sentence
 * @param instance the path that was asked for
 * @param problems the problems of the document that was handed in; left out when there is none
 */
public record RefusalAnswer(
    @JsonProperty("type") String type,
    @JsonProperty("title") String title,
    @JsonProperty("status") int status,
    @JsonProperty("detail") String detail,
    @JsonProperty("instance") String instance,
    @JsonProperty("problems") @JsonInclude(JsonInclude.Include.NON_EMPTY)
        List<ProblemAnswer> problems) {
  /** An absent list is an empty one. */
  public RefusalAnswer {
    problems = problems == null ? List.of() : List.copyOf(problems);
  }
}
