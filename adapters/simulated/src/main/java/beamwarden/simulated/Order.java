package beamwarden.simulated;

/** Something that the adapter was asked to do in its turn. */
interface Order {
  /** Starts; {@code done} is run once when the next order may start. */
  void start(Runnable done);
}
