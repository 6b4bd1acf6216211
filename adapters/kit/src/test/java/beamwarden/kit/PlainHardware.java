package beamwarden.kit;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Scan;
import beamwarden.instrument.Grant;
import beamwarden.quantity.Current;
import beamwarden.timing.Timeline;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalLong;

/** A column and a stage that do as told at once, and a book of every electron they send. */
final class PlainHardware {
  private final Timeline time;
  private final List<Stretch> delivered = new ArrayList<>();
  private int doorsOpened;
  private double currentFactor = 1;
  private double highestFactor = 1;
  private Optional<Grant> exposing = Optional.empty();
  private Instant began = Instant.EPOCH;
  private double electrons;
  private Instant counted = Instant.EPOCH;
  private Optional<Conditions> conditions = Optional.empty();
  private Point stage = new Point(0, 0);
  private boolean valveClosed;
  private Runnable mishapInNextExposure = () -> {};

  PlainHardware(Timeline time) {
    this.time = time;
  }

  String session() {
    return "chamber-" + doorsOpened;
  }

  void openDoor() {
    doorsOpened++;
  }

  /** Does something shortly after the beam has come on the next time. */
  void inNextExposure(Runnable mishap) {
    mishapInNextExposure = mishap;
  }

  void raiseCurrent() {
    count();
    currentFactor = 2;
    highestFactor = 2;
  }

  void set(Conditions wished, Point place) {
    conditions = Optional.of(wished);
    stage = place;
    valveClosed = false;
  }

  void closeValve() {
    valveClosed = true;
  }

  boolean valveClosed() {
    return valveClosed;
  }

  Optional<Conditions> conditions() {
    return conditions;
  }

  Point stage() {
    return stage;
  }

  /** What the meter shows now, without any error. */
  Current current() {
    return conditions.orElseThrow().beam().current().times(currentFactor);
  }

  boolean beamOn() {
    return exposing.isPresent();
  }

  void unblank(Grant grant) {
    exposing = Optional.of(grant);
    began = time.instant();
    counted = began;
    electrons = 0;
    highestFactor = currentFactor;
    time.after(Duration.ofMillis(150), mishapInNextExposure);
    mishapInNextExposure = () -> {};
  }

  Duration sinceUnblanked() {
    return Duration.between(began, time.instant());
  }

  /** Beam besides what was granted, up to now. */
  void strayBeam(OptionalLong under, Duration time) {
    Instant now = this.time.instant();
    double sent = current().electronsIn(time);
    delivered.add(new Stretch(under, now.minus(time), now, sent, current(), OptionalLong.empty()));
  }

  /** Turns the beam off and tells how long it was on. */
  Duration blank() {
    count();
    Duration on = exposing.isPresent() ? Duration.between(began, time.instant()) : Duration.ZERO;
    exposing.ifPresent(grant -> delivered.add(stretch(grant, on)));
    exposing = Optional.empty();
    return on;
  }

  List<Stretch> delivered() {
    return List.copyOf(delivered);
  }

  /** Into how many units the beam gets in a time; the last one may be half done. */
  static long unitsTouched(Scan scan, Duration on) {
    if (scan instanceof RasterScan raster) {
      long line = raster.lineBeamOn().toNanos();
      return Math.min(raster.rowCount(), (on.toNanos() + line - 1) / line);
    }
    return on.toNanos();
  }

  private void count() {
    if (exposing.isPresent()) {
      electrons += current().electronsIn(Duration.between(counted, time.instant()));
      counted = time.instant();
    }
  }

  private Stretch stretch(Grant grant, Duration on) {
    return new Stretch(
        OptionalLong.of(grant.number()),
        began,
        time.instant(),
        electrons,
        conditions.orElseThrow().beam().current().times(highestFactor),
        OptionalLong.of(unitsTouched(grant.exposure().scan(), on)));
  }
}
