package beamwarden.answer;

import com.fasterxml.jackson.annotation.JsonProperty;
import java.util.List;

/**
 * Where jobs stand.
 *
 * @param entry the number of the last entry in the books when they stood so
 * @param jobs the jobs, in the order in which they were handed in
 */
public record JobsAnswer(
    @JsonProperty("entry") long entry, @JsonProperty("jobs") List<ProgressAnswer> jobs) {}
