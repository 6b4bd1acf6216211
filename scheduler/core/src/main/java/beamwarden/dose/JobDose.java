package beamwarden.dose;

import beamwarden.instrument.Abilities;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Current;
import beamwarden.quantity.Fluence;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.LongFunction;
import java.util.stream.Collectors;

/**
 * What a whole job would give its sample, and whether the caps leave room for it.
 *
 * @param best the best value of its charge
 * @param upper the upper value of its charge
 * @param mean the mean fluence of a tile, all its passes together; at a point, inside the circle of
 *     half maximum
 * @param highest the best value of its highest local fluence, it alone, in the averaging of the
 *     sample's first fluence cap (else over the generation range); empty when that is not known
 * @param highestUpper the upper value of it
 * @param verdict whether the caps leave room, given all that is counted
 */
public record JobDose(
    Charge best,
    Charge upper,
    Fluence mean,
    Optional<LocalFluence> highest,
    Optional<LocalFluence> highestUpper,
    CapVerdict verdict) {
  /** What is left of a job, at the current it wishes for. */
  public static JobDose of(
      Job job, Sample sample, Abilities abilities, SampleDose dose, Done done, Optional<Trim> cut) {
    Current wished = job.beam().current();
    List<Delivery> planned = Deliveries.whole(job, sample, abilities, wished, done, cut);
    SampleDose alone = SampleDose.nothing(sample.placement()).plus(planned);
    return new JobDose(
        alone.best(),
        alone.upper(),
        mean(alone, sample),
        highest(alone, sample, Worth.BEST),
        highest(alone, sample, Worth.UPPER),
        Caps.admit(sample, dose, planned));
  }

  /**
   * The largest part of what is left of a job that the caps leave room for: all lines of as many
   * frames as fit, else as many lines of one frame, the same of every filter and tile; at points,
   * as long as fits. Empty when not even one line does.
   *
   * @param read the last reading of the current at the job's settings
   */
  public static Optional<Trim> trim(
      Job job, Sample sample, SampleDose dose, Abilities abilities, Current read, Done done) {
    int passes = Exposures.passes(job);
    int frames = job.acquisition() instanceof Acquisition.Raster raster ? raster.frames() : 1;
    long units = Exposures.pass(job, 0, abilities).whole().units();
    Fits fits =
        trim ->
            Caps.admit(
                    sample,
                    dose,
                    Deliveries.whole(job, sample, abilities, read, done, Optional.of(trim)))
                instanceof CapVerdict.Admitted;
    Optional<Trim> byFrames =
        largest(frames, n -> new Trim(units, Math.toIntExact(passes / frames * n)), fits);
    return byFrames.isPresent()
        ? byFrames
        : largest(units, n -> new Trim(n, passes / frames), fits);
  }

  /** Halves the range between what fits and what does not. */
  private static Optional<Trim> largest(long most, LongFunction<Trim> cut, Fits fits) {
    long fitting = 0;
    long tooMany = most + 1;
    while (tooMany - fitting > 1) {
      long middle = fitting + (tooMany - fitting) / 2;
      if (fits.fits(cut.apply(middle))) {
        fitting = middle;
      } else {
        tooMany = middle;
      }
    }
    return fitting == 0 ? Optional.empty() : Optional.of(cut.apply(fitting));
  }

  private static Fluence mean(SampleDose alone, Sample sample) {
    Averages averages = Averages.of(averaging(sample), sample.material());
    Map<Long, Double> byStay =
        alone.exposed().stream()
            .collect(
                Collectors.groupingBy(
                    pass -> pass.key().stay(),
                    Collectors.summingDouble(pass -> pass.mean(averages))));
    return new Fluence(byStay.values().stream().mapToDouble(mean -> mean).max().orElse(0));
  }

  private static Optional<LocalFluence> highest(SampleDose alone, Sample sample, Worth worth) {
    View view = View.everywhere(averaging(sample), sample, worth);
    boolean known =
        alone.exposed().stream().allMatch(pass -> view.averages().obstacle(pass.key()).isEmpty());
    return known
        ? view.highest(alone.exposed(), alone.exposed()).map(View.Place::fluence)
        : Optional.empty();
  }

  private static Averaging averaging(Sample sample) {
    return sample.caps().stream()
        .filter(Cap.OnFluence.class::isInstance)
        .map(cap -> ((Cap.OnFluence) cap).averaging())
        .findFirst()
        .orElse(new Averaging.OverGeneration());
  }

  /** Whether a part of a job fits. */
  private interface Fits {
    boolean fits(Trim trim);
  }
}
