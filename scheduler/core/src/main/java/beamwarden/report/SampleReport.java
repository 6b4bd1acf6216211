package beamwarden.report;

import beamwarden.dose.Caps;
import beamwarden.dose.Standing;
import beamwarden.ledger.SampleRecord;
import beamwarden.quantity.Charge;
import java.util.List;

/**
 * What a sample has received, all nights together, and what its caps leave.
 *
 * @param id its id
 * @param label what a person calls it
 * @param caps its caps
 * @param charge the best value of the charge it received
 * @param upperCharge the upper value of that charge
 * @param asksForApproval whether a looser version of it was handed in and waits to be approved
 */
public record SampleReport(
    String id,
    String label,
    List<CapReport> caps,
    Charge charge,
    Charge upperCharge,
    boolean asksForApproval) {
  /** Copies the caps. */
  public SampleReport {
    caps = List.copyOf(caps);
  }

  /** What the books say of a sample. */
  public static SampleReport of(SampleRecord record) {
    List<Standing> standings = Caps.standing(record.sample(), record.dose());
    return new SampleReport(
        record.sample().id(),
        record.sample().label(),
        record.sample().caps().stream().map(cap -> CapReport.of(cap, standings)).toList(),
        record.dose().best(),
        record.dose().upper(),
        record.asked().isPresent());
  }
}
