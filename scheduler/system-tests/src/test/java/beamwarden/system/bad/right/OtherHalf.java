package beamwarden.system.bad.right;

import beamwarden.system.bad.left.Half;

/** Closes the circle of packages. */
public final class OtherHalf {
  /** What it took. */
  public Half half() {
    return new Half();
  }
}
