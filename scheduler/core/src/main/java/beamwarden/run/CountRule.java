package beamwarden.run;

import beamwarden.beam.Exposure;
import beamwarden.instrument.Receipt;
import beamwarden.ledger.Books;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.Acquisition;
import java.util.Optional;

/** Whether a count that stops at enough coincidences has enough. */
final class CountRule {
  private CountRule() {}

  /** Whether a pass has enough, what is booked alone counted. */
  static boolean reached(JobRecord record, int pass) {
    return reached(record, pass, 0);
  }

  /** Whether an exposure's pass has enough, a receipt that is not booked yet included. */
  static boolean reached(Books books, Exposure exposure, Receipt receipt) {
    long more = receipt.counts().getOrDefault(JobRecord.COINCIDENCES, 0L);
    Optional<JobRecord> record = books.job(exposure.job());
    return record.isPresent() && reached(record.get(), exposure.pass(), more);
  }

  private static boolean reached(JobRecord record, int pass, long more) {
    return record.job().acquisition() instanceof Acquisition.Spot spot
        && spot.coincidences().isPresent()
        && record.coincidences().getOrDefault(pass, 0L) + more >= spot.coincidences().getAsLong();
  }
}
