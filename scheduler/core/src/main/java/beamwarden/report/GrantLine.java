package beamwarden.report;

import beamwarden.dose.Delivery;
import beamwarden.instrument.Receipt;
import beamwarden.ledger.GrantState;
import java.time.Instant;
import java.util.Optional;

/**
 * What the entries say of one grant, from its first to its last.
 *
 * @param counted what it counts for now; nothing of it counts when it is void
 * @param state where it stands
 * @param openedAt when it was stored
 * @param because why it is presumed or void; empty otherwise
 * @param receipt the receipt that came for it, if one did
 */
public record GrantLine(
    Delivery counted,
    GrantState state,
    Instant openedAt,
    String because,
    Optional<Receipt> receipt) {
  /** The grant's number. */
  public long grant() {
    return counted.grant();
  }

  /** The id of its job. */
  public String job() {
    return counted.exposure().job();
  }

  /** The id of its sample. */
  public String sample() {
    return counted.exposure().sample();
  }

  /** Whether the dose books count it. */
  public boolean counts() {
    return state != GrantState.VOID;
  }

  GrantLine booked(Delivery delivered, Receipt in) {
    return new GrantLine(delivered, GrantState.BOOKED, openedAt, "", Optional.of(in));
  }

  GrantLine presumed(Delivery atMost, String why, Optional<Receipt> doubted) {
    return new GrantLine(atMost, GrantState.PRESUMED, openedAt, why, doubted);
  }

  GrantLine unused(String why) {
    return new GrantLine(counted, GrantState.VOID, openedAt, why, receipt);
  }
}
