package beamwarden.run;

import beamwarden.queue.Area;
import beamwarden.queue.Cap;
import beamwarden.queue.Sample;
import java.util.ArrayList;
import java.util.List;

/**
 * What may be taken over from a re-submitted sample without a person's approval: caps that are new
 * or lower, and keep-out areas that are new. Everything else stays as it was.
 */
final class Tightening {
  private Tightening() {}

  /** The known sample with what is tighter in the wanted one. */
  static Sample of(Sample known, Sample wanted) {
    List<Area> areas = new ArrayList<>(known.areas());
    for (Area area : wanted.areas()) {
      boolean isNew = known.area(area.name()).isEmpty();
      if (isNew && area.use() != Area.Use.SACRIFICIAL) {
        areas.add(area);
      }
    }
    List<Cap> caps = new ArrayList<>();
    for (Cap cap : known.caps()) {
      caps.add(
          wanted.caps().stream()
              .filter(other -> sameKind(cap, other) && limit(other) < limit(cap))
              .findFirst()
              .orElse(cap));
    }
    for (Cap cap : wanted.caps()) {
      if (known.caps().stream().noneMatch(other -> sameKind(cap, other))) {
        caps.add(cap);
      }
    }
    Sample tighter =
        new Sample(known.id(), known.label(), known.material(), known.placement(), areas, caps);
    return sameBut(tighter, wanted) ? wanted : tighter;
  }

  /** Whether two samples differ in their label or the order and reasons of their caps alone. */
  private static boolean sameBut(Sample one, Sample other) {
    return one.material().equals(other.material())
        && one.placement().equals(other.placement())
        && one.areas().size() == other.areas().size()
        && one.areas().containsAll(other.areas())
        && one.caps().size() == other.caps().size()
        && one.caps().stream()
            .allMatch(
                cap ->
                    other.caps().stream()
                        .anyMatch(same -> sameKind(cap, same) && limit(cap) == limit(same)));
  }

  private static boolean sameKind(Cap one, Cap other) {
    return one.getClass() == other.getClass()
        && one.area().equals(other.area())
        && (!(one instanceof Cap.OnFluence fluence)
            || fluence.averaging().equals(((Cap.OnFluence) other).averaging()));
  }

  private static double limit(Cap cap) {
    return cap instanceof Cap.OnFluence fluence
        ? fluence.limit().electronsPerSquareNanometre()
        : ((Cap.OnCharge) cap).limit().coulombs();
  }
}
