package beamwarden.ledger;

import beamwarden.dose.Delivery;
import beamwarden.instrument.Receipt;
import java.util.Optional;

/**
 * What the books know of one grant.
 *
 * @param opened the entry with which it was stored
 * @param state where it stands
 * @param counted what it counts for now; nothing of it counts when it is void
 * @param receipt the receipt that was booked or not believed, if one came
 */
public record GrantRecord(
    Entry.GrantOpened opened, GrantState state, Delivery counted, Optional<Receipt> receipt) {}
