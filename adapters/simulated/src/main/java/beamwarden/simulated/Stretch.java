package beamwarden.simulated;

import beamwarden.beam.Point;
import java.time.Instant;
import java.util.Locale;
import java.util.OptionalLong;

/**
 * A stretch of beam on a sample, as it really went: one line of the instrument's own record.
 *
 * @param began the first electron, on the instrument's line of time
 * @param ended the last electron
 * @param grant the grant under which it flowed; empty when nobody granted it
 * @param fence the grant's fencing number
 * @param sample the sample's id
 * @param shape how the electrons lie
 * @param centre the middle, in sample coordinates
 * @param widthMetres the extent along its own x axis; of a spot the probe's diameter
 * @param heightMetres the extent along its own y axis; of a spot the probe's diameter
 * @param turnDegrees how far its axes are turned counter-clockwise from the sample's
 * @param electrons how many electrons, spread evenly over it in one pass
 * @param currentAmperes the mean current while the beam was on
 */
public record Stretch(
    Instant began,
    Instant ended,
    OptionalLong grant,
    long fence,
    String sample,
    Shape shape,
    Point centre,
    double widthMetres,
    double heightMetres,
    double turnDegrees,
    double electrons,
    double currentAmperes) {
  /** How the electrons of a stretch lie. */
  public enum Shape {
    /** Evenly over a rectangle, as pixels of whole lines or of a part of one. */
    RECTANGLE,
    /** At one place. */
    SPOT,
    /** Evenly over the rectangle across which the beam flew back unblanked. */
    STRIP
  }

  /** The stretch as one line of JSON, without its line end. */
  public String json() {
    return "{\"began\":\"%s\",\"ended\":\"%s\",\"grant\":%s,\"fence\":%d,"
            .formatted(
                began, ended, grant.isPresent() ? Long.toString(grant.getAsLong()) : "null", fence)
        + "\"sample\":%s,\"shape\":\"%s\",\"centre_m\":[%s,%s],\"size_m\":[%s,%s],"
            .formatted(
                Json.text(sample),
                shape.name().toLowerCase(Locale.ROOT),
                centre.xMetres(),
                centre.yMetres(),
                widthMetres,
                heightMetres)
        + "\"turn_deg\":%s,\"passes\":1,\"electrons\":%s,\"current_A\":%s}"
            .formatted(turnDegrees, electrons, currentAmperes);
  }
}
