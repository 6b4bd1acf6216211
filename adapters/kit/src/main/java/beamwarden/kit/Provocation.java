package beamwarden.kit;

import java.util.Optional;

/** A fault that a rig makes on purpose, or the reason why it cannot be made there. */
public final class Provocation {
  private final Optional<Runnable> act;
  private final String whyNot;

  private Provocation(Optional<Runnable> act, String whyNot) {
    this.act = act;
    this.whyNot = whyNot;
  }

  /** The fault is made by {@code act}, which returns once it is in effect. */
  public static Provocation by(Runnable act) {
    return new Provocation(Optional.of(act), "");
  }

  /**
   * The fault cannot be made on this rig, and what hangs on it is reported as not shown.
   *
   * @param whyNot why, as one sentence without a full stop
   */
  public static Provocation impossible(String whyNot) {
    return new Provocation(Optional.empty(), whyNot);
  }

  Optional<Runnable> act() {
    return act;
  }

  String whyNot() {
    return whyNot;
  }
}
