package beamwarden.system;

import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.dose.Caps;
import beamwarden.dose.Delivery;
import beamwarden.dose.LocalFluence;
import beamwarden.dose.Standing;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.GrantState;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.Recorded;
import beamwarden.ledger.SampleRecord;
import beamwarden.quantity.Current;
import beamwarden.queue.Area;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.Sample;
import beamwarden.shift.Shift;
import beamwarden.shift.ShiftCalendar;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.SplittableRandom;

/**
 * What must be true of books and beam at every moment of every night, by name.
 *
 * <p>Holds what the books say against the instrument's own record. The record is summed here by
 * brute force, with formulas of this class's own: Kanaya-Okayama for quartz (27.6 nm · A/(Z^0.89 ρ)
 * · E^1.67 with the weight-mean Z and A of SiO2 divided by 0.9948, the ratio of the harmonic to the
 * mean rule at table 4.1 of the physics notes) and a Gaussian for a spot.
 */
final class Invariants {
  private static final int PLACES_PER_STRETCH = 2;
  private static final int RASTER = 24;
  private static final double ROUNDING = 1e-9;

  private final ShiftCalendar calendar;
  private final Duration clockSlack;
  private final SplittableRandom random;
  private final Map<Long, Entry.GrantOpened> opened = new HashMap<>();
  private final Map<Long, Instant> openedAt = new HashMap<>();
  private final Map<Long, Delivery> counted = new HashMap<>();
  private final Map<Long, GrantState> states = new HashMap<>();
  private final Map<Long, Double> electronsByGrant = new HashMap<>();
  private final Set<Long> receipted = new HashSet<>();
  private final Set<String> submitted = new HashSet<>();
  private final List<Beam> beams = new ArrayList<>();

  /** Samples on which more flowed than the guarantees allow: their caps may be passed. */
  private final Set<String> guaranteesLeft = new HashSet<>();

  /** Grants under which it did. */
  private final Set<Long> surged = new HashSet<>();

  private final Map<String, List<Place>> places = new HashMap<>();
  private int entriesSeen;

  Invariants(ShiftCalendar calendar, long seed) {
    this(calendar, seed, Duration.ZERO);
  }

  /** With processes whose clocks may be apart by so much. */
  Invariants(ShiftCalendar calendar, long seed, Duration clockSlack) {
    this.calendar = calendar;
    this.clockSlack = clockSlack;
    this.random = new SplittableRandom(seed);
  }

  /** A place that is followed through the night. */
  private static final class Place {
    private final Point at;
    private final double turnDegrees;
    private double delivered;

    Place(Point at, double turnDegrees) {
      this.at = at;
      this.turnDegrees = turnDegrees;
    }
  }

  /** Takes in what is new, then checks everything that it may have broken. */
  void check(List<Recorded> recorded, Books books, List<Beam> newBeams) {
    Set<String> touched = new HashSet<>();
    for (Recorded one : recorded.subList(entriesSeen, recorded.size())) {
      take(one);
      touched.add(one.entry().chain());
    }
    entriesSeen = recorded.size();
    for (Beam beam : newBeams) {
      noExposureWithoutAnEarlierGrant(beam);
      noExposureOutsideAShift(beam);
      if (beam.amperes() > opened.get(beam.grant()).inFull().upperCurrent().amperes()) {
        guaranteesLeft.add(beam.sample());
        surged.add(beam.grant());
      }
      electronsByGrant.merge(beam.grant(), beam.electrons(), Double::sum);
      follow(beam);
      touched.add(beam.sample());
      beams.add(beam);
    }
    if (!touched.isEmpty()) {
      nothingIsDoneTwiceWithoutBeingBookedTwice();
      upperIsNeverBelowDelivered(books, touched);
      upperIsNeverAboveACap(books, touched);
      noJobIsLost(books);
    }
  }

  private void take(Recorded recorded) {
    Entry entry = recorded.entry();
    if (entry instanceof Entry.GrantOpened grant) {
      require(
          opened.put(grant.grant(), grant) == null, "GrantNumbersAreUsedOnce: " + grant.grant());
      openedAt.put(grant.grant(), recorded.at());
      counted.put(grant.grant(), grant.inFull());
      states.put(grant.grant(), GrantState.OPEN);
    } else if (entry instanceof Entry.GrantBooked booked) {
      if (states.get(booked.delivered().grant()) == GrantState.BOOKED) {
        guaranteesLeft.add(booked.chain()); // A later reading raised it: the current had left them.
      }
      counted.put(booked.delivered().grant(), booked.delivered());
      states.put(booked.delivered().grant(), GrantState.BOOKED);
    } else if (entry instanceof Entry.GrantPresumed presumed) {
      counted.put(presumed.atMost().grant(), presumed.atMost());
      presumed.receipt().ifPresent(receipt -> receipted.add(receipt.grant()));
      states.put(presumed.atMost().grant(), GrantState.PRESUMED);
    } else if (entry instanceof Entry.GrantVoided voided) {
      counted.remove(voided.grant());
      states.put(voided.grant(), GrantState.VOID);
    } else if (entry instanceof Entry.QueueSubmitted queue) {
      queue.queue().jobs().forEach(job -> submitted.add(job.id()));
    }
  }

  private void noExposureWithoutAnEarlierGrant(Beam beam) {
    Entry.GrantOpened grant = opened.get(beam.grant());
    require(grant != null, "NoExposureWithoutAnEarlierGrant: " + beam);
    require(
        !openedAt.get(beam.grant()).isAfter(beam.began().plus(clockSlack)),
        "NoExposureWithoutAnEarlierGrant: stored after the beam came on, " + beam);
    require(
        grant.exposure().sample().equals(beam.sample()),
        "NoExposureWithoutAnEarlierGrant: another sample, " + beam);
  }

  private void noExposureOutsideAShift(Beam beam) {
    Optional<Shift> shift = calendar.current(beam.began().plus(clockSlack));
    require(shift.isPresent(), "NoExposureOutsideAShift: " + beam);
    require(
        !beam.ended().isAfter(shift.get().usableEnd().plus(clockSlack)),
        "NoExposureOutsideAShift: late, " + beam);
  }

  /** Also says that what was voided was never exposed. */
  private void nothingIsDoneTwiceWithoutBeingBookedTwice() {
    electronsByGrant.forEach(
        (grant, electrons) -> {
          Delivery booked = counted.get(grant);
          double upper =
              booked == null ? 0 : booked.upperCurrent().electronsIn(booked.upperBeamOn());
          require(
              isUnbookedSurge(grant) || electrons <= upper * (1 + ROUNDING),
              "NothingIsDoneTwiceWithoutBeingBookedTwice: grant "
                  + grant
                  + " "
                  + states.get(grant)
                  + " delivered "
                  + electrons
                  + " electrons, books at most "
                  + upper);
        });
  }

  private void follow(Beam beam) {
    List<Place> ofSample = places.computeIfAbsent(beam.sample(), id -> new ArrayList<>());
    for (int i = 0; i < PLACES_PER_STRETCH; i++) {
      Rectangle outline = beam.outline();
      double dx = beam.spot() ? 0 : (random.nextDouble() - 0.5) * outline.widthMetres();
      double dy = beam.spot() ? 0 : edgeOrInside(outline.heightMetres());
      Place place = new Place(outline.at(dx, dy), outline.turnDegrees());
      beams.stream()
          .filter(other -> other.sample().equals(beam.sample()))
          .forEach(other -> add(place, other));
      ofSample.add(place);
    }
    ofSample.forEach(place -> add(place, beam));
  }

  /** Every other place lies just inside an edge, where seams are. */
  private double edgeOrInside(double height) {
    double middle = (random.nextDouble() - 0.5) * height;
    return random.nextBoolean() ? middle : Math.copySign(height / 2 * (1 - 1e-6), middle);
  }

  private void add(Place place, Beam beam) {
    double volts = opened.get(beam.grant()).exposure().conditions().beam().voltage().volts();
    place.delivered += beam.fluenceAt(place.at, sigma(volts / 1e3));
  }

  private static double sigma(double kilovolts) {
    double weightMean = 27.6e-9 * 21.65 / (Math.pow(10.80, 0.89) * 2.65);
    double range = weightMean * Math.pow(kilovolts, 1.67) * 0.9948;
    return range / (2 * Math.sqrt(2 * Math.log(2)));
  }

  /** Only what was touched can have changed. */
  private void upperIsNeverBelowDelivered(Books books, Set<String> touched) {
    for (SampleRecord record : withTruthBooked(books, touched)) {
      for (Place place : places.getOrDefault(record.sample().id(), List.of())) {
        atMostUpper(record, place);
      }
    }
  }

  private static void atMostUpper(SampleRecord record, Place place) {
    double delivered = place.delivered;
    double upper = upperAt(record.sample(), record, place.at, place.turnDegrees);
    require(
        delivered <= upper * (1 + 1e-6) + 1e-9,
        "UpperIsNeverBelowDelivered: sample "
            + record.sample().id()
            + " at "
            + place.at
            + " received "
            + delivered
            + " e/nm2, books at most "
            + upper);
  }

  private static double upperAt(Sample sample, SampleRecord record, Point at, double turnDegrees) {
    return LocalFluence.upperAt(
            sample, record.dose(), new Averaging.OverGeneration(), at, turnDegrees)
        .electronsPerSquareNanometre();
  }

  private void upperIsNeverAboveACap(Books books, Set<String> touched) {
    for (SampleRecord record : withGuaranteesKept(books, touched)) {
      for (Standing standing : Caps.standing(record.sample(), record.dose())) {
        require(
            standing.upper() <= standing.limit(),
            "UpperIsNeverAboveACap: sample " + record.sample().id() + " " + standing);
      }
    }
  }

  /** A surge is booked as what it was as soon as its receipt is in; before that nobody knows. */
  private boolean isUnbookedSurge(long grant) {
    boolean known = states.get(grant) == GrantState.BOOKED || receipted.contains(grant);
    return surged.contains(grant) && !known;
  }

  private List<SampleRecord> withTruthBooked(Books books, Set<String> among) {
    Set<String> unknown = new HashSet<>();
    surged.stream()
        .filter(this::isUnbookedSurge)
        .forEach(grant -> unknown.add(opened.get(grant).exposure().sample()));
    return books.samples().stream()
        .filter(record -> among.contains(record.sample().id()))
        .filter(record -> !unknown.contains(record.sample().id()))
        .toList();
  }

  /** On how many samples the instrument left its guarantees. */
  int samplesWithGuaranteesLeft() {
    return guaranteesLeft.size();
  }

  /** The promise holds while the instrument keeps its guarantees: samples on which it did. */
  private List<SampleRecord> withGuaranteesKept(Books books, Set<String> among) {
    return books.samples().stream()
        .filter(record -> among.contains(record.sample().id()))
        .filter(record -> !guaranteesLeft.contains(record.sample().id()))
        .toList();
  }

  private void noJobIsLost(Books books) {
    for (String id : submitted) {
      require(books.job(id).isPresent(), "NoJobIsLost: " + id);
    }
  }

  /** At the end of a night: the whole plane of every sample, raster by raster, and every job. */
  void checkAtTheEnd(Books books) {
    for (SampleRecord record : withTruthBooked(books, places.keySet())) {
      List<Beam> ofSample =
          beams.stream().filter(beam -> beam.sample().equals(record.sample().id())).toList();
      if (!ofSample.isEmpty()) {
        raster(record, ofSample);
      }
    }
    for (JobRecord job : books.jobs()) {
      require(job.state().ended() || job.heldFor().isPresent(), "NoJobIsLost: " + job);
    }
  }

  private void raster(SampleRecord record, List<Beam> ofSample) {
    double[] reach = reach(ofSample);
    for (int row = 0; row < RASTER; row++) {
      for (int column = 0; column < RASTER; column++) {
        Point at =
            new Point(
                reach[0] + (column + 0.5) / RASTER * (reach[1] - reach[0]),
                reach[2] + (row + 0.5) / RASTER * (reach[3] - reach[2]));
        Place place = new Place(at, 0);
        ofSample.forEach(beam -> add(place, beam));
        atMostUpper(record, place);
        boolean exempt = isSpentGround(record.sample(), at);
        if (!exempt && !guaranteesLeft.contains(record.sample().id())) {
          deliveredIsBelowTheCaps(record.sample(), place);
        }
      }
    }
    if (!guaranteesLeft.contains(record.sample().id())) {
      chargeIsBelowTheCaps(record.sample(), ofSample);
    }
  }

  /** Left, right, bottom and top of where the beam was. */
  private static double[] reach(List<Beam> ofSample) {
    double[] reach = {Double.MAX_VALUE, -Double.MAX_VALUE, Double.MAX_VALUE, -Double.MAX_VALUE};
    for (Beam beam : ofSample) {
      double half = Math.hypot(beam.outline().widthMetres(), beam.outline().heightMetres()) / 2;
      Point centre = beam.outline().centre();
      reach[0] = Math.min(reach[0], centre.xMetres() - half);
      reach[1] = Math.max(reach[1], centre.xMetres() + half);
      reach[2] = Math.min(reach[2], centre.yMetres() - half);
      reach[3] = Math.max(reach[3], centre.yMetres() + half);
    }
    return reach;
  }

  /** Charges and keep-out areas, summed from the record alone; areas here lie along the axes. */
  private static void chargeIsBelowTheCaps(Sample sample, List<Beam> ofSample) {
    for (Cap cap : sample.caps()) {
      if (cap instanceof Cap.OnCharge charge) {
        double coulombs = 0;
        for (Beam beam : ofSample) {
          boolean counts =
              charge.area().isEmpty()
                  || inside(beam, sample.area(charge.area().get()).orElseThrow());
          coulombs += counts ? beam.electrons() * Current.ELEMENTARY_CHARGE_COULOMBS : 0;
        }
        require(
            coulombs <= charge.limit().coulombs(),
            "DeliveredIsNeverAboveACap: " + sample.id() + " " + charge + ": " + coulombs + " C");
      }
    }
    sample.areas().stream()
        .filter(area -> area.use() == Area.Use.KEEP_OUT)
        .forEach(
            area ->
                require(
                    ofSample.stream().noneMatch(beam -> inside(beam, area)),
                    "NothingReachesAKeepOutArea: " + sample.id() + " " + area));
  }

  /** Fluence caps of the whole sample do not hold there. */
  private static boolean isSpentGround(Sample sample, Point at) {
    return sample.areas().stream()
        .filter(area -> area.use() == Area.Use.SACRIFICIAL)
        .anyMatch(area -> inside(at, area));
  }

  private static boolean inside(Beam beam, Area area) {
    return inside(beam.outline().centre(), area);
  }

  private static boolean inside(Point centre, Area area) {
    Rectangle outline = area.outline();
    return Math.abs(centre.xMetres() - outline.centre().xMetres()) < outline.widthMetres() / 2
        && Math.abs(centre.yMetres() - outline.centre().yMetres()) < outline.heightMetres() / 2;
  }

  /** The promise itself, without any of the program's sums. */
  private static void deliveredIsBelowTheCaps(Sample sample, Place place) {
    double delivered = place.delivered;
    for (Cap cap : sample.caps()) {
      if (cap instanceof Cap.OnFluence fluence && fluence.area().isEmpty()) {
        require(
            delivered <= fluence.limit().electronsPerSquareNanometre(),
            "DeliveredIsNeverAboveACap: " + sample.id() + " at " + place.at + ": " + delivered);
      }
    }
  }

  private static void require(boolean holds, String broken) {
    if (!holds) {
      throw new AssertionError(broken);
    }
  }
}
