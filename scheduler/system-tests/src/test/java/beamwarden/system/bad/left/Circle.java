package beamwarden.system.bad.left;

import beamwarden.system.bad.right.OtherHalf;

/** Opens a circle of packages. */
final class Circle {
  private Circle() {}

  static OtherHalf other() {
    return new OtherHalf();
  }
}
