package beamwarden.store;

import beamwarden.bridge.ContractJson;
import beamwarden.ledger.Entry;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import com.fasterxml.jackson.annotation.JsonSubTypes;
import com.fasterxml.jackson.annotation.JsonTypeInfo;
import tools.jackson.core.JacksonException;
import tools.jackson.databind.json.JsonMapper;

/**
 * The JSON in which the body of an entry is stored: the {@linkplain ContractJson form of the
 * contract}, and the core's records alike.
 *
 * <p>An optional component may be added to a record at any time. Any other change to a stored
 * record needs a new {@link #FORMAT}, and a step here that lifts bodies of the earlier one.
 */
final class EntryJson {
  /** The lowest format of a body that this program reads. */
  static final int LOWEST_FORMAT = 1;

  /** The format in which bodies are written. */
  static final int FORMAT = 1;

  private static final JsonMapper MAPPER =
      ContractJson.builder()
          .addMixIn(Acquisition.class, AcquisitionKinds.class)
          .addMixIn(Cap.class, CapKinds.class)
          .addMixIn(Averaging.class, AveragingKinds.class)
          .build();

  private EntryJson() {}

  static String write(Entry entry) {
    return MAPPER.writeValueAsString(entry);
  }

  /**
   * Reads a body.
   *
   * @throws IllegalArgumentException when it is not of that kind and format
   */
  static Entry read(String kind, int format, String body) {
    if (format < LOWEST_FORMAT || format > FORMAT) {
      throw new IllegalArgumentException(
          "its format is "
              + format
              + ", and this program reads "
              + LOWEST_FORMAT
              + " to "
              + FORMAT);
    }
    EntryKind known =
        EntryKind.named(kind)
            .orElseThrow(
                () -> new IllegalArgumentException("this program knows no kind '" + kind + "'"));
    try {
      return MAPPER.readValue(body, known.type());
    } catch (JacksonException e) {
      throw new IllegalArgumentException("its body is not one of kind '" + kind + "'", e);
    }
  }

  @JsonTypeInfo(use = JsonTypeInfo.Id.NAME, property = "acquisition")
  @JsonSubTypes({
    @JsonSubTypes.Type(value = Acquisition.Raster.class, name = "raster"),
    @JsonSubTypes.Type(value = Acquisition.Spot.class, name = "spot")
  })
  private interface AcquisitionKinds {}

  @JsonTypeInfo(use = JsonTypeInfo.Id.NAME, property = "cap")
  @JsonSubTypes({
    @JsonSubTypes.Type(value = Cap.OnFluence.class, name = "fluence"),
    @JsonSubTypes.Type(value = Cap.OnCharge.class, name = "charge")
  })
  private interface CapKinds {}

  @JsonTypeInfo(use = JsonTypeInfo.Id.NAME, property = "over")
  @JsonSubTypes({
    @JsonSubTypes.Type(value = Averaging.OverGeneration.class, name = "generation"),
    @JsonSubTypes.Type(value = Averaging.OverProbe.class, name = "probe"),
    @JsonSubTypes.Type(value = Averaging.OverLength.class, name = "length")
  })
  private interface AveragingKinds {}
}
