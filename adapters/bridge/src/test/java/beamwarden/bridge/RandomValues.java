package beamwarden.bridge;

import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import java.lang.reflect.InvocationTargetException;
import java.lang.reflect.ParameterizedType;
import java.lang.reflect.RecordComponent;
import java.lang.reflect.Type;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Random;
import java.util.Set;

/** Makes values of any record or closed set of records from a seed. */
final class RandomValues {
  private static final int MOST_TRIES = 10_000;
  private static final String[] TEXTS = {
    "", "sst-07", "µm \"quoted\" \\ back", "zwei\nZeilen", "点"
  };

  private final Random random;

  RandomValues(long seed) {
    random = new Random(seed);
  }

  <T> T of(Class<T> type) {
    return type.cast(any(type));
  }

  private Object any(Type type) {
    if (type instanceof ParameterizedType generic) {
      return container((Class<?>) generic.getRawType(), generic.getActualTypeArguments());
    }
    Class<?> plain = (Class<?>) type;
    if (plain.isSealed()) {
      Class<?>[] kinds = plain.getPermittedSubclasses();
      return any(kinds[random.nextInt(kinds.length)]);
    }
    if (plain.isEnum()) {
      return plain.getEnumConstants()[random.nextInt(plain.getEnumConstants().length)];
    }
    if (plain == RasterScan.class) {
      return raster();
    }
    return plain.isRecord() ? record(plain) : scalar(plain);
  }

  private Object record(Class<?> type) {
    RecordComponent[] components = type.getRecordComponents();
    Class<?>[] types = new Class<?>[components.length];
    for (int i = 0; i < types.length; i++) {
      types[i] = components[i].getType();
    }
    for (int tries = 0; tries < MOST_TRIES; tries++) {
      try {
        Object[] values = new Object[components.length];
        for (int i = 0; i < values.length; i++) {
          values[i] = any(components[i].getGenericType());
        }
        var constructor = type.getDeclaredConstructor(types);
        constructor.setAccessible(true);
        return constructor.newInstance(values);
      } catch (InvocationTargetException refused) {
        // The record refused what chance made; another throw.
      } catch (ReflectiveOperationException e) {
        throw new LinkageError(e.getMessage(), e);
      }
    }
    throw new AssertionError("no valid " + type + " in " + MOST_TRIES + " tries");
  }

  /** Chance alone seldom finds lines within a frame. */
  private RasterScan raster() {
    int first = random.nextInt(1000);
    int count = 1 + random.nextInt(1000);
    return new RasterScan(
        (Rectangle) record(Rectangle.class),
        1 + random.nextInt(5000),
        first + count + random.nextInt(1000),
        first,
        count,
        Duration.ofNanos(1 + random.nextInt(Integer.MAX_VALUE)),
        Duration.ofNanos(random.nextInt(Integer.MAX_VALUE)));
  }

  private Object container(Class<?> raw, Type[] of) {
    if (raw == Optional.class) {
      return random.nextBoolean() ? Optional.of(any(of[0])) : Optional.empty();
    }
    int size = random.nextInt(4);
    if (raw == Map.class) {
      Map<Object, Object> map = new HashMap<>();
      for (int i = 0; i < size; i++) {
        map.put(any(of[0]), any(of[1]));
      }
      return map;
    }
    List<Object> list = new ArrayList<>();
    for (int i = 0; i < size; i++) {
      list.add(any(of[0]));
    }
    return raw == Set.class ? new HashSet<>(list) : list;
  }

  private Object scalar(Class<?> type) {
    if (type == double.class || type == Double.class) {
      return number();
    } else if (type == int.class || type == Integer.class) {
      return random.nextInt(20);
    } else if (type == long.class || type == Long.class) {
      return random.nextInt(5) == 0 ? random.nextLong() : random.nextInt(1000);
    } else if (type == boolean.class) {
      return random.nextBoolean();
    } else if (type == String.class) {
      return TEXTS[random.nextInt(TEXTS.length)];
    } else if (type == Duration.class) {
      return duration();
    } else if (type == Instant.class) {
      return Instant.ofEpochSecond(random.nextInt(), random.nextInt(1_000_000_000));
    } else if (type == OptionalDouble.class) {
      return random.nextBoolean() ? OptionalDouble.of(number()) : OptionalDouble.empty();
    } else if (type == OptionalInt.class) {
      return random.nextBoolean() ? OptionalInt.of(random.nextInt()) : OptionalInt.empty();
    }
    throw new AssertionError("no random " + type);
  }

  private double number() {
    double anyBits = Double.longBitsToDouble(random.nextLong());
    return switch (random.nextInt(4)) {
      case 0 -> random.nextDouble();
      case 1 -> (random.nextInt(20_000) - 10_000) * 1e-9;
      case 2 -> random.nextInt(5) - 1;
      default -> Double.isFinite(anyBits) ? anyBits : -0.0;
    };
  }

  private Duration duration() {
    return switch (random.nextInt(4)) {
      case 0 -> Duration.ofNanos(random.nextInt());
      case 1 -> Duration.ofSeconds(random.nextInt(50_000));
      case 2 -> Duration.ofNanos(random.nextInt(100));
      default -> Duration.ofSeconds(random.nextLong(), random.nextInt(1_000_000_000));
    };
  }
}
