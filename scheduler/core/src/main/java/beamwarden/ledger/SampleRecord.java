package beamwarden.ledger;

import beamwarden.dose.SampleDose;
import beamwarden.queue.Sample;
import java.util.Optional;

/**
 * What the books know of one sample.
 *
 * @param sample the sample with the caps that hold
 * @param asked the sample as it was last handed in, when that is looser and not yet approved
 * @param dose everything it has received or may yet receive
 * @param head the head of its chain of entries
 */
public record SampleRecord(Sample sample, Optional<Sample> asked, SampleDose dose, String head) {
  SampleRecord with(SampleDose newDose) {
    return new SampleRecord(sample, asked, newDose, head);
  }

  SampleRecord asking(Optional<Sample> looser) {
    return new SampleRecord(sample, looser, dose, head);
  }

  SampleRecord declared(Sample now) {
    Optional<Sample> still = asked.filter(wanted -> !wanted.equals(now));
    return new SampleRecord(now, still, dose.at(now.placement()), head);
  }

  SampleRecord withHead(String newHead) {
    return new SampleRecord(sample, asked, dose, newHead);
  }
}
