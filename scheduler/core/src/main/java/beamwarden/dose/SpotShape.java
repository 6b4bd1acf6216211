package beamwarden.dose;

import beamwarden.beam.Point;
import beamwarden.beam.SpotScan;
import beamwarden.physics.GaussianSpot;
import java.util.ArrayList;
import java.util.Collection;
import java.util.List;

/**
 * The Gaussian that a rest at a point leaves, all its slices together.
 *
 * <p>It is bounded by a stack of nested squares whose half sides are 1, 2, … quarters of σ, out to
 * 8σ, each widened by how far off the point may lie. Between two squares the sum is the Gaussian at
 * the inner one's half side, so it is nowhere below the Gaussian, is its highest in the innermost
 * square, and lies above it by 15 % of the highest at most along the axes and 39 % at most
 * anywhere. Beyond 8σ less than 2e-14 of the highest is left out.
 */
record SpotShape(Point at, double bestElectrons, double upperElectrons) implements PassDose.Shape {
  private static final double STEP_SIGMAS = 0.25;
  private static final int STEPS = 32;

  static SpotShape of(PassKey key, Collection<Delivery> deliveries) {
    return new SpotShape(
        ((SpotScan) key.whole()).at(),
        electrons(deliveries, Worth.BEST),
        electrons(deliveries, Worth.UPPER));
  }

  private static double electrons(Collection<Delivery> deliveries, Worth worth) {
    return deliveries.stream()
        .filter(delivery -> delivery.unitsTouched() > 0)
        .mapToDouble(
            delivery ->
                PassDose.current(delivery, worth).electronsIn(PassDose.beamOn(delivery, worth)))
        .sum();
  }

  @Override
  public List<Footprint> footprints(
      Worth worth, double sigmaMetres, double offsetMetres, Axes axes) {
    if (sigmaMetres == 0) {
      return List.of(new Footprint(core(offsetMetres, axes), Double.POSITIVE_INFINITY));
    }
    GaussianSpot spot = new GaussianSpot(sigmaMetres);
    double highest = spot.highest(worth == Worth.UPPER ? upperElectrons : bestElectrons);
    double step = STEP_SIGMAS * sigmaMetres;
    List<Footprint> squares = new ArrayList<>();
    for (int square = 1; square <= STEPS; square++) {
      double outside = square == STEPS ? 0 : spot.falloff(square * step);
      double fluence = highest * (spot.falloff((square - 1) * step) - outside);
      squares.add(new Footprint(Box.square(at, square * step + offsetMetres, axes), fluence));
    }
    return squares;
  }

  @Override
  public Box bounds(Worth worth, double sigmaMetres, double offsetMetres, Axes axes) {
    return Box.square(at, STEPS * STEP_SIGMAS * sigmaMetres + offsetMetres, axes);
  }

  @Override
  public Box core(double offsetMetres, Axes axes) {
    return Box.square(at, offsetMetres, axes);
  }

  @Override
  public double mean(double sigmaMetres) {
    return sigmaMetres == 0
        ? 0
        : new GaussianSpot(sigmaMetres).highest(bestElectrons) * GaussianSpot.MEAN_OVER_HIGHEST;
  }

  @Override
  public boolean touchesAnything() {
    return bestElectrons > 0 || upperElectrons > 0;
  }
}
