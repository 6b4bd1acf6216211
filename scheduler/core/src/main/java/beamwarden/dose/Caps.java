package beamwarden.dose;

import beamwarden.queue.Cap;
import beamwarden.queue.Sample;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * The rule: nothing is admitted that could bring an upper value above a cap.
 *
 * <p>Values are compared as they are, without any slack. In this order:
 *
 * <ol>
 *   <li>nothing may reach a keep-out area ({@link Ground});
 *   <li>nothing that is not wholly inside a sacrificial area may reach it;
 *   <li>each cap in the order of the sample: on fluence, the highest sum among the places that the
 *       asked passes cover, along every pass's own axes, sacrificial areas left out unless the cap
 *       names one; on charge, all of the sample's, or of the passes whose footprint touches the
 *       area.
 * </ol>
 *
 * <p>Areas are wider by the placement's uncertainty where they are protected, and narrower by it
 * where they are exempt.
 */
public final class Caps {
  static final String FLUENCE_UNIT = "e/nm2";
  static final String CHARGE_UNIT = "C";

  private static final String ADVICE =
      "ask for less dwell, current or passes, or have more approved";

  private Caps() {}

  /**
   * Whether one more delivery may be granted, given all that is counted: booked, open, presumed.
   */
  public static CapVerdict admit(Sample sample, SampleDose dose, Delivery asked) {
    return admit(sample, dose, List.of(asked));
  }

  /** Whether several more deliveries may all be granted. */
  public static CapVerdict admit(Sample sample, SampleDose dose, List<Delivery> asked) {
    Request request = Request.of(sample, dose, asked);
    return Stream.concat(
            Ground.refusals(request),
            sample.caps().stream().flatMap(cap -> refusal(request, cap).stream()))
        .findFirst()
        .map(CapVerdict.class::cast)
        .orElseGet(CapVerdict.Admitted::new);
  }

  private static Optional<CapVerdict.Refused> refusal(Request request, Cap cap) {
    return cap instanceof Cap.OnFluence onFluence
        ? fluenceRefusal(request, onFluence)
        : chargeRefusal(request, (Cap.OnCharge) cap);
  }

  private static Optional<CapVerdict.Refused> fluenceRefusal(Request request, Cap.OnFluence cap) {
    View view = View.of(cap, request.sample(), Worth.UPPER);
    Optional<String> obstacle =
        request.after().exposed().stream()
            .flatMap(pass -> view.averages().obstacle(pass.key()).stream())
            .findFirst();
    double limit = cap.limit().electronsPerSquareNanometre();
    if (obstacle.isPresent()) {
      String because =
          request.job() + " is refused by the " + Texts.cap(cap) + ": " + obstacle.get();
      return Optional.of(
          new CapVerdict.Refused(cap, FLUENCE_UNIT, 0, 0, limit, Optional.empty(), because));
    }
    List<PassDose> after = request.after().exposed();
    List<PassDose> asked = after.stream().filter(request.asked()::contains).toList();
    return view.highest(after, view.touched(after, asked))
        .filter(place -> !(place.sum() <= limit))
        .map(place -> refused(request, cap, view, place));
  }

  private static CapVerdict.Refused refused(
      Request request, Cap.OnFluence cap, View view, View.Place place) {
    double booked = view.sum(request.before().exposed(), place);
    double asked = Math.max(0, place.sum() - booked);
    String because =
        String.format(
            "%s would bring the local fluence at %s to %s (%s booked, %s asked; upper values),"
                + " above the %s; "
                + ADVICE,
            request.job(),
            Texts.place(place.at()),
            Texts.fluence(place.sum()),
            Texts.fluence(booked),
            Texts.fluence(asked),
            Texts.cap(cap));
    double limit = cap.limit().electronsPerSquareNanometre();
    return new CapVerdict.Refused(
        cap, FLUENCE_UNIT, asked, booked, limit, Optional.of(place.at()), because);
  }

  private static Optional<CapVerdict.Refused> chargeRefusal(Request request, Cap.OnCharge cap) {
    List<PassDose> counted = counted(request.sample(), request.after(), cap, Worth.UPPER);
    double after = coulombs(counted, Worth.UPPER);
    double limit = cap.limit().coulombs();
    if (after <= limit || counted.stream().noneMatch(request.asked()::contains)) {
      return Optional.empty();
    }
    double booked =
        coulombs(counted(request.sample(), request.before(), cap, Worth.UPPER), Worth.UPPER);
    double asked = after - booked;
    String because =
        String.format(
            "%s would bring the charge to %s (%s booked, %s asked; upper values), above the %s; "
                + ADVICE,
            request.job(),
            Texts.charge(after),
            Texts.charge(booked),
            Texts.charge(asked),
            Texts.cap(cap));
    return Optional.of(
        new CapVerdict.Refused(cap, CHARGE_UNIT, asked, booked, limit, Optional.empty(), because));
  }

  /** The passes whose charge a cap counts. */
  private static List<PassDose> counted(
      Sample sample, SampleDose dose, Cap.OnCharge cap, Worth worth) {
    return cap.area()
        .map(name -> Ground.touching(sample, dose, Ground.area(sample, name), worth))
        .orElse(dose.passes());
  }

  private static double coulombs(List<PassDose> passes, Worth worth) {
    return passes.stream().mapToDouble(pass -> pass.coulombs(worth)).sum();
  }

  /**
   * How much of each cap is used, in the order of the sample. A fluence cap whose averaging cannot
   * be worked out is left out; nothing is admitted under it.
   */
  public static List<Standing> standing(Sample sample, SampleDose dose) {
    SampleDose present = dose.at(sample.placement());
    return sample.caps().stream()
        .flatMap(
            cap ->
                cap instanceof Cap.OnFluence onFluence
                    ? standing(sample, present, onFluence).stream()
                    : Stream.of(standing(sample, present, (Cap.OnCharge) cap)))
        .toList();
  }

  private static Optional<Standing> standing(Sample sample, SampleDose dose, Cap.OnFluence cap) {
    View view = View.of(cap, sample, Worth.UPPER);
    List<PassDose> passes = dose.exposed();
    if (passes.stream().anyMatch(pass -> view.averages().obstacle(pass.key()).isPresent())) {
      return Optional.empty();
    }
    Optional<View.Place> upper = view.highest(passes, passes);
    double best =
        View.of(cap, sample, Worth.BEST).highest(passes, passes).map(View.Place::sum).orElse(0.0);
    return Optional.of(
        new Standing(
            cap,
            FLUENCE_UNIT,
            cap.limit().electronsPerSquareNanometre(),
            best,
            upper.map(View.Place::sum).orElse(0.0),
            upper.map(View.Place::at)));
  }

  private static Standing standing(Sample sample, SampleDose dose, Cap.OnCharge cap) {
    return new Standing(
        cap,
        CHARGE_UNIT,
        cap.limit().coulombs(),
        coulombs(counted(sample, dose, cap, Worth.BEST), Worth.BEST),
        coulombs(counted(sample, dose, cap, Worth.UPPER), Worth.UPPER),
        Optional.empty());
  }

  /**
   * What is asked, and what the books say before and after.
   *
   * @param sample the sample
   * @param before what is counted without it
   * @param after what is counted with it
   * @param alone it alone
   * @param asked the passes of {@code after} that it belongs to
   */
  record Request(
      Sample sample, SampleDose before, SampleDose after, SampleDose alone, List<PassDose> asked) {
    static Request of(Sample sample, SampleDose dose, List<Delivery> asked) {
      SampleDose before = dose.at(sample.placement());
      SampleDose after = before.plus(asked);
      SampleDose alone = SampleDose.nothing(sample.placement()).plus(asked);
      List<PassKey> keys = alone.passes().stream().map(PassDose::key).toList();
      List<PassDose> passes =
          after.passes().stream().filter(pass -> keys.contains(pass.key())).toList();
      return new Request(sample, before, after, alone, passes);
    }

    String job() {
      return alone.passes().isEmpty() ? "nothing" : "job " + alone.passes().get(0).key().job();
    }
  }
}
