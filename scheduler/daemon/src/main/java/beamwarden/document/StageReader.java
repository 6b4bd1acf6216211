package beamwarden.document;

import beamwarden.document.Quantities.Range;
import beamwarden.document.Quantities.Sign;
import beamwarden.instrument.Field;
import beamwarden.instrument.Stage;
import beamwarden.quantity.Dimension;
import beamwarden.quantity.Length;
import java.time.Duration;
import java.util.Optional;

/** Reads what a profile says of the stage and the scan field. */
final class StageReader {
  static final String STAGE_EXAMPLE =
      "{ x: [-25 mm, 25 mm], y: [-25 mm, 25 mm], speed: 1 mm/s, acceleration: 10 mm/s2,"
          + " settling: 2 s, repeatability: 2 um }";
  static final String FIELD_EXAMPLE = "{ largest: 0.5 mm, calibration: 2 % }";

  private static final Keys STAGE =
      Keys.of("a stage", "x", "y", "speed", "acceleration", "settling", "repeatability");
  private static final Keys FIELD = Keys.of("a field", "largest", "calibration");
  private static final String REACH = "[-25 mm, 25 mm]";
  private static final String MOST_CALIBRATION = "50 %";

  private final Values values;
  private final Quantities quantities;

  StageReader(Values values, Problems problems) {
    this.values = values;
    this.quantities = new Quantities(values, problems);
  }

  Optional<Stage> stage(Node node) {
    return values.fields(node, STAGE_EXAMPLE, STAGE).flatMap(this::stage);
  }

  private Optional<Stage> stage(Fields fields) {
    Optional<Range<Length>> x = fields.need("x", REACH, this::reach);
    Optional<Range<Length>> y = fields.need("y", REACH, this::reach);
    Optional<Double> speed = number(fields, "speed", Dimension.SPEED, Sign.POSITIVE);
    Optional<Double> acceleration =
        number(fields, "acceleration", Dimension.ACCELERATION, Sign.POSITIVE);
    Optional<Duration> settling =
        fields.need("settling", "2 s", node -> quantities.time(node, Sign.NOT_NEGATIVE));
    Optional<Length> repeatability =
        fields.need("repeatability", "2 um", node -> quantities.length(node, Sign.NOT_NEGATIVE));
    return Values.all(x, y, speed, acceleration, settling, repeatability)
        ? Optional.of(
            new Stage(
                x.get().low().metres(),
                x.get().high().metres(),
                y.get().low().metres(),
                y.get().high().metres(),
                speed.get(),
                acceleration.get(),
                settling.get(),
                repeatability.get().metres()))
        : Optional.empty();
  }

  private Optional<Range<Length>> reach(Node node) {
    return quantities.range(node, REACH, item -> quantities.length(item, Sign.ANY));
  }

  private Optional<Double> number(Fields fields, String key, Dimension dimension, Sign sign) {
    return fields.need(key, dimension.example(), node -> quantities.number(node, dimension, sign));
  }

  Optional<Field> field(Node node) {
    Optional<Fields> fields = values.fields(node, FIELD_EXAMPLE, FIELD);
    Optional<Length> largest =
        fields.flatMap(
            found ->
                found.need("largest", "0.5 mm", each -> quantities.length(each, Sign.POSITIVE)));
    Optional<Double> calibration =
        fields.flatMap(
            found ->
                found.need("calibration", "2 %", each -> quantities.part(each, MOST_CALIBRATION)));
    return Values.all(largest, calibration)
        ? Optional.of(new Field(largest.get().metres(), calibration.get()))
        : Optional.empty();
  }
}
