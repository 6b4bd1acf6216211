package beamwarden.ledger;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;

import org.junit.jupiter.api.Test;

/**
 * Expected values were computed with another program (Python's hashlib and struct) from the Javadoc
 * of {@link ChainHash} alone.
 */
class ChainHashTest {
  private static final String GENESIS = ChainHash.genesis("store-1", "sst-07");

  @Test
  void beforeTheFirstEntryStandsTheStoreAndTheChain() {
    assertEquals("b34c6f776ac59d9c8816e7edb7092dd877c131b399bac858e2a359f6a987a577", GENESIS);
    assertEquals(
        "0c9fb80b25f96b45c9a52ff1ddbc475e2a2f9709d8c40595f6563c420c59e648",
        ChainHash.genesis("store-1", ""));
  }

  @Test
  void anEntryIsHashedOverAllItsFields() {
    assertEquals(
        "b2a403f7b47d3bcf193b127baec199104fe54d94866fe3b2e851033cee09e36d",
        ChainHash.entry(
            GENESIS,
            12,
            "2031-03-12T19:00:00Z",
            3,
            "sst-07",
            "grant-voided",
            1,
            "{\"grant\":7,\"because\":\"µ\"}"));
  }

  @Test
  void aCharacterMovedToTheNextFieldGivesAnotherHash() {
    assertNotEquals(ChainHash.genesis("store-1", "a"), ChainHash.genesis("store-", "1a"));
    assertNotEquals(
        ChainHash.entry(GENESIS, 12, "2031", 3, "a", "bc", 1, "{}"),
        ChainHash.entry(GENESIS, 12, "2031", 3, "ab", "c", 1, "{}"));
  }
}
