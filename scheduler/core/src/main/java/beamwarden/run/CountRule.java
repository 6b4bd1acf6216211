package beamwarden.run;

import beamwarden.beam.Exposure;
import beamwarden.instrument.Receipt;
import beamwarden.ledger.Books;
import beamwarden.ledger.JobRecord;
import java.util.Optional;

/** Whether a count that stops at enough coincidences has enough. */
final class CountRule {
  private CountRule() {}

  /** Whether an exposure's pass has enough, a receipt that is not booked yet included. */
  static boolean reached(Books books, Exposure exposure, Receipt receipt) {
    long more = receipt.counts().getOrDefault(JobRecord.COINCIDENCES, 0L);
    Optional<JobRecord> record = books.job(exposure.job());
    return record.isPresent() && record.get().enough(exposure.pass(), more);
  }
}
