package beamwarden.report;

import beamwarden.beam.Point;
import beamwarden.dose.Caps;
import beamwarden.dose.Delivery;
import beamwarden.dose.SampleDose;
import beamwarden.dose.Standing;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Fluence;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.Sample;
import java.util.Collection;
import java.util.List;
import java.util.Optional;

/**
 * What a job gave its sample, itself alone.
 *
 * <p>Fluences are averaged over the length that the sample's first fluence cap names, or else over
 * the generation range.
 *
 * @param charge the best value of its charge
 * @param upperCharge the upper value of its charge
 * @param highest the best value of the highest local fluence; empty when the averaging length
 *     cannot be worked out
 * @param upperHighest the upper value of the highest local fluence; empty likewise
 * @param at where the upper value is reached; empty when nothing was exposed
 */
public record DoseAlone(
    Charge charge,
    Charge upperCharge,
    Optional<Fluence> highest,
    Optional<Fluence> upperHighest,
    Optional<Point> at) {
  private static final double NO_LIMIT = Double.MAX_VALUE;

  /** The dose that these deliveries make, all of one job on one sample. */
  public static DoseAlone of(Sample sample, Collection<Delivery> deliveries) {
    SampleDose alone = SampleDose.nothing(sample.placement()).plus(deliveries);
    Optional<Standing> standing = Caps.standing(bare(sample), alone).stream().findFirst();
    return new DoseAlone(
        alone.best(),
        alone.upper(),
        standing.map(known -> new Fluence(known.best())),
        standing.map(known -> new Fluence(known.upper())),
        standing.flatMap(Standing::at));
  }

  /** The sample under one cap that never binds and holds everywhere, spent ground included. */
  private static Sample bare(Sample sample) {
    Cap anywhere =
        new Cap.OnFluence(new Fluence(NO_LIMIT), averaging(sample), Optional.empty(), "");
    return new Sample(
        sample.id(),
        sample.label(),
        sample.material(),
        sample.placement(),
        List.of(),
        List.of(anywhere));
  }

  private static Averaging averaging(Sample sample) {
    return sample.caps().stream()
        .filter(Cap.OnFluence.class::isInstance)
        .map(cap -> ((Cap.OnFluence) cap).averaging())
        .findFirst()
        .orElseGet(Averaging.OverGeneration::new);
  }
}
