package beamwarden.system;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.classes;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.codeUnits;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;

import com.tngtech.archunit.base.DescribedPredicate;
import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaCodeUnit;
import com.tngtech.archunit.core.domain.JavaConstructorCall;
import com.tngtech.archunit.core.domain.JavaModifier;
import com.tngtech.archunit.core.domain.JavaType;
import com.tngtech.archunit.core.domain.properties.HasName;
import com.tngtech.archunit.lang.ArchCondition;
import com.tngtech.archunit.lang.ArchRule;
import com.tngtech.archunit.lang.ConditionEvents;
import com.tngtech.archunit.lang.SimpleConditionEvent;
import com.tngtech.archunit.library.GeneralCodingRules;
import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.Set;
import java.util.stream.Stream;

/** The rules of the architecture, for any root package, so that each can be shown to fail. */
final class ArchitectureRules {
  private static final Set<String> GENERIC_EXCEPTIONS =
      Set.of(
          "java.lang.Throwable",
          "java.lang.Error",
          "java.lang.Exception",
          "java.lang.RuntimeException");

  private static final DescribedPredicate<JavaClass> JDK =
      DescribedPredicate.describe(
          "are the JDK's, databases apart",
          type -> {
            JavaClass single = type.getBaseComponentType();
            String name = single.getPackageName();
            boolean database = name.startsWith("java.sql") || name.startsWith("javax.sql");
            return single.isPrimitive() || (name.startsWith("java.") && !database);
          });

  /** The constructor of a subclass calls its superclass's: that is no throwing. */
  private static final DescribedPredicate<JavaConstructorCall> MAKES_A_GENERIC_EXCEPTION =
      DescribedPredicate.describe(
          "makes a generic exception",
          call ->
              GENERIC_EXCEPTIONS.contains(call.getTargetOwner().getName())
                  && !(call.getOrigin().isConstructor()
                      && call.getOriginOwner().isAssignableTo(Throwable.class)));

  private static final DescribedPredicate<JavaCodeUnit> CAN_BE_CALLED_FROM_OUTSIDE =
      DescribedPredicate.describe(
          "can be called from outside",
          unit -> isSeen(unit.getModifiers()) && isSeen(unit.getOwner().getModifiers()));

  private final String root;

  ArchitectureRules(String root) {
    this.root = root;
  }

  ArchRule noPackageCycles() {
    return slices().matching(root + ".(**)").should().beFreeOfCycles();
  }

  /** A package imports what its row says, the JDK without its databases, and nothing else. */
  ArchRule importsOnlyWhatItsRowSays(PackageTable.Row row) {
    List<String> allowed = new ArrayList<>(row.libraryPackages());
    allowed.add(qualified(row.name()));
    row.imports().forEach(name -> allowed.add(qualified(name)));
    return classes()
        .that()
        .resideInAPackage(qualified(row.name()))
        .should()
        .onlyDependOnClassesThat(
            residesInAnyOf(allowed).or(JDK).as("are the JDK's or reside in " + allowed));
  }

  ArchRule noneOfTheseImports(Collection<String> packages, Collection<String> forbidden) {
    return noClasses()
        .that()
        .resideInAnyPackage(qualified(packages))
        .should()
        .dependOnClassesThat()
        .resideInAnyPackage(qualified(forbidden));
  }

  ArchRule onlyTheseReadTheSystemClock(Collection<String> packages) {
    return noClasses()
        .that()
        .resideOutsideOfPackages(qualified(packages))
        .should()
        .accessTargetWhere(SystemClock.READS);
  }

  /**
   * Packages and single classes that may touch the standard streams.
   *
   * @param packages names of packages below the root
   * @param mains simple names of classes
   */
  ArchRule onlyTheseUseTheStandardStreams(Collection<String> packages, Collection<String> mains) {
    return noClasses()
        .that()
        .resideOutsideOfPackages(qualified(packages))
        .and(DescribedPredicate.not(simplyNamedOneOf(mains)))
        .should(GeneralCodingRules.ACCESS_STANDARD_STREAMS);
  }

  static ArchRule noGenericExceptionIsThrown() {
    return noClasses().should().callConstructorWhere(MAKES_A_GENERIC_EXCEPTION);
  }

  /**
   * What others may call, outside the library's own packages, shows none of the library's types.
   */
  ArchRule noSignatureShowsALibrary(String library, Collection<String> own) {
    DescribedPredicate<JavaClass> types = residesInAnyOf(PackageTable.packagesOf(library));
    return codeUnits()
        .that()
        .areDeclaredInClassesThat()
        .resideOutsideOfPackages(qualified(own))
        .and(CAN_BE_CALLED_FROM_OUTSIDE)
        .should(showNone(types.as(library)));
  }

  private String qualified(String name) {
    return root + "." + name;
  }

  private String[] qualified(Collection<String> names) {
    return names.stream().map(this::qualified).toArray(String[]::new);
  }

  private static DescribedPredicate<JavaClass> residesInAnyOf(Collection<String> packages) {
    DescribedPredicate<JavaClass> inside =
        JavaClass.Predicates.resideInAnyPackage(packages.toArray(String[]::new));
    return DescribedPredicate.describe(
        "reside in " + packages, type -> inside.test(type.getBaseComponentType()));
  }

  private static DescribedPredicate<HasName> simplyNamedOneOf(Collection<String> names) {
    return DescribedPredicate.describe(
        "named one of " + names,
        named -> names.stream().anyMatch(name -> named.getName().endsWith("." + name)));
  }

  private static boolean isSeen(Set<JavaModifier> modifiers) {
    return modifiers.contains(JavaModifier.PUBLIC) || modifiers.contains(JavaModifier.PROTECTED);
  }

  private static Stream<JavaClass> shownBy(JavaCodeUnit unit) {
    Stream<JavaType> types =
        Stream.concat(unit.getParameterTypes().stream(), Stream.of(unit.getReturnType()));
    return Stream.concat(
        types.flatMap(type -> type.getAllInvolvedRawTypes().stream()),
        unit.getExceptionTypes().stream());
  }

  private static ArchCondition<JavaCodeUnit> showNone(DescribedPredicate<JavaClass> types) {
    return new ArchCondition<>("show no type of " + types.getDescription()) {
      @Override
      public void check(JavaCodeUnit unit, ConditionEvents events) {
        shownBy(unit)
            .filter(types)
            .forEach(
                type ->
                    events.add(
                        SimpleConditionEvent.violated(
                            unit, unit.getFullName() + " shows " + type.getName())));
      }
    };
  }
}
