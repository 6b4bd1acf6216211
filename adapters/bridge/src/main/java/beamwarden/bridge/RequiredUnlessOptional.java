package beamwarden.bridge;

import java.lang.reflect.RecordComponent;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.OptionalLong;
import java.util.Set;
import tools.jackson.databind.cfg.MapperConfig;
import tools.jackson.databind.introspect.AnnotatedMember;
import tools.jackson.databind.introspect.AnnotatedParameter;
import tools.jackson.databind.introspect.JacksonAnnotationIntrospector;

/** Demands every {@linkplain RecordComponent component} of a record that is not optional. */
final class RequiredUnlessOptional extends JacksonAnnotationIntrospector {
  private static final Set<Class<?>> OPTIONAL =
      Set.of(Optional.class, OptionalDouble.class, OptionalInt.class, OptionalLong.class);

  @Override
  public Boolean hasRequiredMarker(MapperConfig<?> config, AnnotatedMember member) {
    if (member instanceof AnnotatedParameter && member.getDeclaringClass().isRecord()) {
      return !OPTIONAL.contains(member.getRawType());
    }
    return super.hasRequiredMarker(config, member);
  }
}
