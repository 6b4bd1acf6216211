package beamwarden.bridge;

import beamwarden.instrument.InstrumentEvent;
import java.util.OptionalInt;
import java.util.OptionalLong;

/** One line of a connection. */
sealed interface Message {
  /**
   * From the daemon: it asks for something and wants to know that it has arrived.
   *
   * @param id rises by one with each request of a connection
   * @param call what it asks for
   */
  record Request(long id, Call call) implements Message {}

  /**
   * From the adapter, at once: the request has arrived. What comes of it is told by an event.
   *
   * @param id the request's id
   * @param protocol which version of these messages the adapter speaks; in the answer to hello only
   */
  record Accepted(long id, OptionalInt protocol) implements Message {}

  /**
   * From the adapter, and the last message of its connection: why it ends it.
   *
   * @param id the request that it will not take; empty when it was none
   * @param code one of the {@link ErrorCode}s
   * @param text one sentence for a person
   */
  record Refused(OptionalLong id, int code, String text) implements Message {}

  /**
   * From the adapter: something happened.
   *
   * @param event what happened
   */
  record Told(InstrumentEvent event) implements Message {}
}
