package beamwarden.bridge;

import beamwarden.beam.Rectangle;
import beamwarden.beam.Region;
import beamwarden.beam.Scan;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import com.fasterxml.jackson.annotation.JsonInclude;
import java.time.Duration;
import java.util.OptionalDouble;
import tools.jackson.core.StreamReadFeature;
import tools.jackson.core.StreamWriteFeature;
import tools.jackson.core.json.JsonFactory;
import tools.jackson.databind.DeserializationFeature;
import tools.jackson.databind.EnumNamingStrategies;
import tools.jackson.databind.MapperFeature;
import tools.jackson.databind.SerializationFeature;
import tools.jackson.databind.cfg.DateTimeFeature;
import tools.jackson.databind.cfg.EnumFeature;
import tools.jackson.databind.json.JsonMapper;
import tools.jackson.databind.module.SimpleModule;

/**
 * The one JSON form of everything in the contract.
 *
 * <p>A record is an object with its components in their order; a quantity is an object whose key is
 * its unit. What is one of several kinds says which in its first property ({@code scan}, {@code
 * region}, {@code fate}, {@code event}). Constants are lower case with hyphens, times RFC 3339,
 * durations {@code PT12.5S} (only seconds are written; any ISO 8601 duration of days and smaller is
 * read). What is absent is left out; {@code null} is read as absent. Keys of maps are sorted. Every
 * finite double, duration and instant survives the way there and back without change, and the same
 * value always gives the same bytes.
 *
 * <p>Reading is strict: a property that is missing, unknown or there twice, a number in quotes, a
 * fraction where a whole number is meant, and a number beyond a double's range are refused. An
 * unknown property is refused too, on purpose: it may be a limit, and a limit that the reader does
 * not know must not be passed over. What is new comes with a new protocol number instead.
 *
 * <p>Immutable and safe for use by several threads.
 */
public final class ContractJson {
  private static final JsonMapper MAPPER = builder().build();

  private ContractJson() {}

  /** The mapper for the types of the contract. */
  public static JsonMapper mapper() {
    return MAPPER;
  }

  /** A builder with all of the above, to which further types may be added. */
  public static JsonMapper.Builder builder() {
    JsonMapper.Builder builder =
        JsonMapper.builder(
            JsonFactory.builder()
                .enable(StreamReadFeature.STRICT_DUPLICATE_DETECTION)
                .enable(StreamWriteFeature.USE_FAST_DOUBLE_WRITER)
                .disable(StreamReadFeature.INCLUDE_SOURCE_IN_LOCATION)
                .build());
    readStrictly(builder);
    writeStably(builder);
    return builder
        .annotationIntrospector(new RequiredUnlessOptional())
        .enumNamingStrategy(EnumNamingStrategies.KEBAB_CASE)
        .addModule(scalars())
        .addMixIn(Scan.class, Kinds.OfScan.class)
        .addMixIn(Region.class, Kinds.OfRegion.class)
        .addMixIn(Rectangle.class, Kinds.Known.class)
        .addMixIn(GrantFate.class, Kinds.OfFate.class)
        .addMixIn(InstrumentEvent.class, Kinds.OfEvent.class);
  }

  private static void readStrictly(JsonMapper.Builder builder) {
    builder
        .enable(
            DeserializationFeature.FAIL_ON_UNKNOWN_PROPERTIES,
            DeserializationFeature.FAIL_ON_NULL_FOR_PRIMITIVES,
            DeserializationFeature.FAIL_ON_NULL_CREATOR_PROPERTIES,
            DeserializationFeature.FAIL_ON_READING_DUP_TREE_KEY,
            DeserializationFeature.FAIL_ON_TRAILING_TOKENS)
        .disable(DeserializationFeature.ACCEPT_FLOAT_AS_INT)
        .enable(EnumFeature.FAIL_ON_NUMBERS_FOR_ENUMS)
        .disable(MapperFeature.ALLOW_COERCION_OF_SCALARS);
  }

  private static void writeStably(JsonMapper.Builder builder) {
    builder
        .enable(MapperFeature.INFER_RECORD_GETTERS_FROM_COMPONENTS_ONLY)
        .disable(MapperFeature.SORT_PROPERTIES_ALPHABETICALLY)
        .enable(SerializationFeature.ORDER_MAP_ENTRIES_BY_KEYS)
        .disable(SerializationFeature.FAIL_ON_EMPTY_BEANS)
        .disable(DateTimeFeature.WRITE_DATES_AS_TIMESTAMPS)
        .changeDefaultPropertyInclusion(
            value -> value.withValueInclusion(JsonInclude.Include.NON_ABSENT));
  }

  private static SimpleModule scalars() {
    return new SimpleModule("beamwarden")
        .addSerializer(Duration.class, new Scalars.DurationWriter())
        .addDeserializer(Duration.class, new Scalars.DurationReader())
        .addSerializer(Double.class, new Scalars.FiniteWriter())
        .addSerializer(double.class, new Scalars.FiniteWriter())
        .addDeserializer(Double.class, new Scalars.FiniteReader())
        .addDeserializer(double.class, new Scalars.FiniteReader())
        .addSerializer(OptionalDouble.class, new Scalars.OptionalFiniteWriter())
        .addDeserializer(OptionalDouble.class, new Scalars.OptionalFiniteReader());
  }
}
