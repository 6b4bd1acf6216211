package beamwarden.web.stream;

/** Where a follower's messages go. */
public interface Outlet {
  /**
   * Hands a message on; returns at once.
   *
   * @param message the message
   * @param sent run once it is on its way
   */
  void send(Message message, Runnable sent);

  /** Ends the connection. */
  void close();
}
