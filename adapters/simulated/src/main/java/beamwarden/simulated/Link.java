package beamwarden.simulated;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentListener;
import java.util.function.Consumer;

/** The way to whoever listens; what is said while it is cut is not heard. */
final class Link {
  private static final InstrumentListener NOBODY = event -> {};

  private InstrumentListener listener = NOBODY;
  private long connection;

  void to(InstrumentListener next) {
    listener = next;
    connection++;
  }

  void cut() {
    to(NOBODY);
  }

  boolean isUp() {
    return listener != NOBODY;
  }

  void say(InstrumentEvent event) {
    listener.on(event);
  }

  /** Says things in this connection only: an answer is not for whoever connects after it. */
  Consumer<InstrumentEvent> answer() {
    long asked = connection;
    return event -> {
      if (connection == asked) {
        say(event);
      }
    };
  }
}
