package beamwarden.dose;

import beamwarden.beam.Point;

/**
 * The axes along which a sum is made: the sample's own, turned counter-clockwise.
 *
 * @param turnDegrees by how much
 */
record Axes(double turnDegrees) {
  /** The sample's own axes. */
  static final Axes SAMPLE = new Axes(0);

  private static final double SAME_DEGREES = 1e-9;

  /** A place on the sample, in these axes. */
  Point in(Point onSample) {
    return onSample.turned(-turnDegrees);
  }

  /** A place in these axes, on the sample. */
  Point out(Point inAxes) {
    return inAxes.turned(turnDegrees);
  }

  /** How many quarter turns lie between these axes and something turned; empty when not whole. */
  boolean alongWith(double otherTurnDegrees) {
    return Math.abs(fromQuarter(otherTurnDegrees)) < SAME_DEGREES;
  }

  /** Whether something that lies along these axes has its width along their y axis. */
  boolean crosswise(double otherTurnDegrees) {
    return Math.round((otherTurnDegrees - turnDegrees) / 90) % 2 != 0;
  }

  private double fromQuarter(double otherTurnDegrees) {
    return Math.IEEEremainder(otherTurnDegrees - turnDegrees, 90);
  }
}
