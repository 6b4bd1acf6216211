package beamwarden.dose;

import beamwarden.beam.Placement;
import beamwarden.beam.RasterScan;
import beamwarden.quantity.Current;
import java.time.Duration;
import java.util.Collection;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.NavigableMap;
import java.util.TreeMap;

/**
 * What one pass gave a sample without a move of the stage: its deliveries, and the footprint they
 * leave together. Never changes.
 */
final class PassDose {
  private final PassKey key;
  private final NavigableMap<Long, Delivery> deliveries;
  private final Shape shape;
  private final double bestCoulombs;
  private final double upperCoulombs;

  private PassDose(PassKey key, NavigableMap<Long, Delivery> deliveries) {
    this.key = key;
    this.deliveries = Collections.unmodifiableNavigableMap(deliveries);
    this.shape =
        key.whole() instanceof RasterScan raster
            ? RasterShape.of(key, raster, deliveries.values())
            : SpotShape.of(key, deliveries.values());
    this.bestCoulombs = coulombs(deliveries.values(), Worth.BEST);
    this.upperCoulombs = coulombs(deliveries.values(), Worth.UPPER);
  }

  private static double coulombs(Collection<Delivery> deliveries, Worth worth) {
    return deliveries.stream()
        .mapToDouble(
            delivery -> current(delivery, worth).chargeIn(beamOn(delivery, worth)).coulombs())
        .sum();
  }

  /** A pass of which nothing is known yet but these. */
  static PassDose of(PassKey key, Map<Long, Delivery> deliveries) {
    return new PassDose(key, new TreeMap<>(deliveries));
  }

  PassDose plus(Map<Long, Delivery> more) {
    NavigableMap<Long, Delivery> all = new TreeMap<>(deliveries);
    all.putAll(more);
    return new PassDose(key, all);
  }

  PassDose without(long grant) {
    NavigableMap<Long, Delivery> rest = new TreeMap<>(deliveries);
    rest.remove(grant);
    return new PassDose(key, rest);
  }

  PassKey key() {
    return key;
  }

  boolean holds(long grant) {
    return deliveries.containsKey(grant);
  }

  boolean isEmpty() {
    return deliveries.isEmpty();
  }

  /** The charge in coulombs: I·t of each delivery, summed. */
  double coulombs(Worth worth) {
    return worth == Worth.UPPER ? upperCoulombs : bestCoulombs;
  }

  /** The footprints, along some axes, of which every place sums those that cover it. */
  List<Footprint> footprints(Worth worth, Averages averages, Placement present, Axes axes) {
    return shape.footprints(worth, averages.sigmaMetres(key), offset(worth, present), axes);
  }

  /** A box around all footprints. */
  Box bounds(Worth worth, Averages averages, Placement present, Axes axes) {
    return shape.bounds(worth, averages.sigmaMetres(key), offset(worth, present), axes);
  }

  /** A box around where the beam itself may land, its tails left out. */
  Box core(Placement present, Axes axes) {
    return shape.core(key.offsetMetres(present), axes);
  }

  /** The best value of the mean fluence in e/nm². */
  double mean(Averages averages) {
    return shape.mean(averages.sigmaMetres(key));
  }

  /** Whether any electron may have landed. */
  boolean touchesAnything() {
    return shape.touchesAnything();
  }

  private double offset(Worth worth, Placement present) {
    return worth == Worth.UPPER ? key.offsetMetres(present) : 0;
  }

  static Current current(Delivery delivery, Worth worth) {
    return worth == Worth.UPPER ? delivery.upperCurrent() : delivery.bestCurrent();
  }

  static Duration beamOn(Delivery delivery, Worth worth) {
    return worth == Worth.UPPER ? delivery.upperBeamOn() : delivery.bestBeamOn();
  }

  /** What a pass leaves on a sample. */
  sealed interface Shape permits RasterShape, SpotShape {
    /**
     * The footprints.
     *
     * @param worth which value
     * @param sigmaMetres the width over which they are averaged
     * @param offsetMetres how far off the pass may lie
     * @param axes the axes along which they are wanted
     */
    List<Footprint> footprints(Worth worth, double sigmaMetres, double offsetMetres, Axes axes);

    /** A box around them, without working them out. */
    Box bounds(Worth worth, double sigmaMetres, double offsetMetres, Axes axes);

    /** A box around where the beam itself may land at most. */
    Box core(double offsetMetres, Axes axes);

    /** The best value of the mean fluence: of a raster, or in a point's circle of half maximum. */
    double mean(double sigmaMetres);

    /** Whether there are any. */
    boolean touchesAnything();
  }
}
