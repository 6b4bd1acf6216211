package beamwarden.answer;

import com.fasterxml.jackson.annotation.JsonProperty;
import java.util.List;

/**
 * A queue was taken in.
 *
 * @param queue its name
 * @param jobs the ids of its jobs
 * @param problems warnings about its document
 */
public record SubmittedAnswer(
    @JsonProperty("queue") String queue,
    @JsonProperty("jobs") List<String> jobs,
    @JsonProperty("problems") List<ProblemAnswer> problems) {}
