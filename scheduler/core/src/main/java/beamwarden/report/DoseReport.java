package beamwarden.report;

import beamwarden.ledger.Books;
import beamwarden.ledger.Recorded;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;

/**
 * One sample's dose books.
 *
 * @param sample the sample and its caps
 * @param grants its grants, in the order in which they were stored
 * @param head the head of its chain of entries
 * @param zone the lab's time zone, for people
 */
public record DoseReport(SampleReport sample, List<GrantLine> grants, String head, ZoneId zone) {
  /** Copies the list. */
  public DoseReport {
    grants = List.copyOf(grants);
  }

  /**
   * The books of a sample; empty when they do not know it.
   *
   * @param sample the sample's id
   * @param books what the entries say taken together
   * @param entries all entries
   * @param zone the lab's time zone
   */
  public static Optional<DoseReport> of(
      String sample, Books books, List<Recorded> entries, ZoneId zone) {
    return books
        .sample(sample)
        .map(
            record ->
                new DoseReport(
                    SampleReport.of(record),
                    GrantLines.of(entries).stream()
                        .filter(line -> line.sample().equals(sample))
                        .toList(),
                    record.head(),
                    zone));
  }
}
