package beamwarden.dose;

import beamwarden.beam.Point;

/**
 * The axes along which a sum is made: the sample's own, turned counter-clockwise.
 *
 * @param turnDegrees by how much; quarter turns are left out, since they change no axis
 */
record Axes(double turnDegrees) {
  /** The sample's own axes. */
  static final Axes SAMPLE = new Axes(0);

  private static final double SAME_DEGREES = 1e-9;

  /** Leaves out quarter turns. */
  Axes {
    turnDegrees -= 90 * Math.floor(turnDegrees / 90);
  }

  /** A place on the sample, in these axes. */
  Point in(Point onSample) {
    return onSample.turned(-turnDegrees);
  }

  /** A place in these axes, on the sample. */
  Point out(Point inAxes) {
    return inAxes.turned(turnDegrees);
  }

  /** Whether something of that turn has its sides along these axes. */
  boolean alongWith(double otherTurnDegrees) {
    return Math.abs(Math.IEEEremainder(otherTurnDegrees - turnDegrees, 90)) < SAME_DEGREES;
  }

  /** Whether something that lies along these axes has its width along their y axis. */
  boolean crosswise(double otherTurnDegrees) {
    return Math.round((otherTurnDegrees - turnDegrees) / 90) % 2 != 0;
  }
}
