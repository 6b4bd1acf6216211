package beamwarden.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.dose.Delivery;
import beamwarden.dose.Done;
import beamwarden.instrument.CurrentReading;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.ledger.JobRecord;
import beamwarden.quantity.Current;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import beamwarden.run.Exposing;
import java.time.LocalDate;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

class NightReportsTest {
  private final Lab lab = new Lab();

  private NightReport report() {
    return report(Optional.empty());
  }

  private NightReport report(Optional<Exposing> exposing) {
    Night night = Night.on(LocalDate.of(2031, 3, 12), Lab.calendar(), Lab.ZONE).orElseThrow();
    return new NightReports("north-room", Lab.ZONE).of(night, lab.entries(), exposing, lab.now());
  }

  private JobReport only() {
    assertEquals(1, report().jobs().size());
    return report().jobs().get(0);
  }

  @Nested
  class Dose {
    @Test
    void ofAJobIsItsOwnAlone() {
      lab.submit(Lab.map("first"), Lab.map("second")).at(Lab.OPENS.plusSeconds(900));
      lab.done(Lab.map("first"), 1).done(Lab.map("second"), 2);
      for (JobReport job : report().jobs()) {
        // 1 nA for 10 us on each of 100 x 100 pixels of 10 nm: #2.1 of the physics notes, scaled.
        assertEquals(1e-10, job.dose().charge().coulombs(), 1e-16);
        assertEquals(
            Lab.MAP_FLUENCE,
            job.dose().highest().orElseThrow().electronsPerSquareNanometre(),
            Lab.MAP_FLUENCE * 1e-6);
      }
    }

    @Test
    void ofASampleIsEverythingTogether() {
      lab.submit(Lab.map("first"), Lab.map("second")).at(Lab.OPENS.plusSeconds(900));
      lab.done(Lab.map("first"), 1).done(Lab.map("second"), 2);
      CapReport anywhere = report().samples().get(0).caps().get(0);
      assertEquals("fluence", anywhere.kind());
      assertEquals("e/nm2", anywhere.unit());
      assertEquals(
          2 * Lab.MAP_FLUENCE, anywhere.booked().getAsDouble(), 2 * Lab.MAP_FLUENCE * 1e-6);
      // The drift the profile allows, 10 %, is in the upper value.
      assertEquals(
          2.2 * Lab.MAP_FLUENCE, anywhere.upper().getAsDouble(), 2.2 * Lab.MAP_FLUENCE * 1e-6);
      assertEquals(9000 - anywhere.upper().getAsDouble(), anywhere.left(), 1e-9);
      CapReport area = report().samples().get(0).caps().get(1);
      assertEquals(Optional.of("isotope-grain"), area.area());
      assertEquals(0, area.upper().getAsDouble());
      CapReport charge = report().samples().get(0).caps().get(2);
      assertEquals(2e-10, charge.booked().getAsDouble(), 1e-16);
      assertEquals(2.2e-10, charge.upper().getAsDouble(), 1e-16);
    }

    @Test
    void doesNotCountWhatWasProvedUnused() {
      Delivery never = Lab.planned(Lab.map("first"), Done.NOTHING, 1);
      lab.submit(Lab.map("first")).at(Lab.OPENS.plusSeconds(900)).open(never);
      lab.write(new Entry.GrantVoided(1, "sst-07", false, "it was never sent"));
      assertEquals(0, only().dose().charge().coulombs());
      assertEquals(0, only().dose().highest().orElseThrow().electronsPerSquareNanometre());
    }

    @Test
    void ofAGrantWithAnUnknownOutcomeCountsInFullAndIsNamed() {
      Delivery lost = Lab.planned(Lab.map("first"), Done.NOTHING, 1);
      lab.submit(Lab.map("first")).at(Lab.OPENS.plusSeconds(900)).open(lost);
      lab.write(new Entry.GrantPresumed(lost, "the instrument cannot say", Optional.empty()));
      assertEquals(1.1e-10, only().dose().upperCharge().coulombs(), 1e-16);
      GrantLine presumed = report().presumed().get(0);
      assertEquals(1, presumed.grant());
      assertEquals("the instrument cannot say", presumed.because());
    }
  }

  @Nested
  class Jobs {
    @Test
    void areDoneInPartAsTheirUnitsAre() {
      Delivery half = Lab.planned(Lab.map("first"), Done.NOTHING, 1);
      lab.submit(Lab.map("first")).at(Lab.OPENS.plusSeconds(900)).open(half);
      lab.book(half, 25, Map.of());
      assertEquals(0.25, only().progress().doneFraction(), 1e-12);
      assertEquals(1, only().progress().exposures());
    }

    @Test
    void countWhatIsBeingExposed() {
      Delivery first = Lab.planned(Lab.map("first"), Done.NOTHING, 1);
      lab.submit(Lab.map("first")).at(Lab.OPENS.plusSeconds(900)).open(first);
      Exposing exposing =
          new Exposing(new Entry.GrantOpened(first, first.upperBeamOn(), "session"), 40);
      JobProgress progress = report(Optional.of(exposing)).jobs().get(0).progress();
      assertEquals(0.4, progress.doneFraction(), 1e-12);
      assertEquals(new RunningExposure("first", 1, 0, 40, 100), progress.running().orElseThrow());
    }

    @Test
    void haveAPointWithEnoughCoincidencesWholeHoweverSoonItHadThem() {
      lab.submit(Lab.count("pairs", 1000)).at(Lab.OPENS.plusSeconds(900));
      Delivery early = Lab.planned(Lab.count("pairs", 1000), Done.NOTHING, 1);
      long tenSeconds = 10_000_000_000L;
      lab.open(early).book(early, tenSeconds, Map.of(JobRecord.COINCIDENCES, 1000L));
      assertEquals(0.5, only().progress().doneFraction(), 1e-12);
    }

    @Test
    void areReadyOnceTheirTimeHasComeAndAShiftIsOpen() {
      lab.submit(Lab.map("first"), Lab.map("second", "first"));
      assertEquals(JobState.WAITING, report().jobs().get(0).progress().state());
      lab.at(Lab.OPENS.plusSeconds(1));
      assertEquals(JobState.READY, report().jobs().get(0).progress().state());
      assertEquals(JobState.WAITING, report().jobs().get(1).progress().state());
      lab.done(Lab.map("first"), 1);
      assertEquals(JobState.READY, report().jobs().get(1).progress().state());
    }

    @Test
    void thatEndedBeforeTheNightAreLeftOut() {
      lab.submit(Lab.map("first"), Lab.map("second"));
      lab.state("first", JobState.WITHDRAWN, "a person took it back");
      assertEquals("second", only().progress().id());
    }

    @Test
    void thatAreNotWhollyDoneAreToldApartWithTheirReason() {
      lab.submit(Lab.map("first"), Lab.map("second")).at(Lab.OPENS.plusSeconds(900));
      lab.done(Lab.map("first"), 1);
      lab.held("second", HeldFor.A_PERSON, "a person holds it");
      List<JobReport> undone = report().undone();
      assertEquals(1, undone.size());
      assertEquals("second", undone.get(0).progress().id());
      assertEquals("a person holds it", undone.get(0).progress().because());
    }
  }

  @Nested
  class TheNight {
    @Test
    void namesFaultsStopsAndApprovalsInItsOwnTime() {
      lab.submit(Lab.map("first")).note(What.FAULT, "before the night");
      lab.at(Lab.OPENS).note(What.SHIFT_OPENED, "shift").note(What.FAULT, "a detector");
      lab.note(What.STOPPED, "the vacuum is gone");
      lab.write(new Entry.Approved("placements", "looked at it"));
      lab.at(Lab.OPENS.plusSeconds(86_400)).note(What.FAULT, "the night after");
      assertEquals(
          List.of(
              new NightEvent(Lab.OPENS, "fault", "a detector"),
              new NightEvent(Lab.OPENS, "stopped", "the vacuum is gone"),
              new NightEvent(Lab.OPENS, "approved", "placements approved: looked at it")),
          report().events());
    }

    @Test
    void listsEachFileOnceThoughAReadingRaisedItsReceipt() {
      lab.submit(Lab.map("first")).at(Lab.OPENS.plusSeconds(900));
      lab.done(Lab.map("first"), 1);
      Delivery inFull = Lab.planned(Lab.map("first"), Done.NOTHING, 1);
      lab.book(inFull, 100, Map.of());
      assertEquals(1, report().files().size());
      assertEquals("data/first/1.dat", report().files().get(0).file().path());
      assertEquals(1024, report().files().get(0).file().bytes());
    }

    @Test
    void listsCurrentReadings() {
      CurrentReading reading = new CurrentReading(Lab.map("first").beam(), new Current(1.02e-9));
      lab.submit(Lab.map("first")).at(Lab.OPENS).write(new Entry.CurrentMeasured(reading));
      assertEquals(List.of(new NightReport.Reading(Lab.OPENS, reading)), report().readings());
    }

    @Test
    void standsAsItEndedThoughMoreCameLater() {
      lab.submit(Lab.map("first"), Lab.map("second")).at(Lab.OPENS.plusSeconds(900));
      lab.done(Lab.map("first"), 1);
      lab.at(Lab.OPENS.plusSeconds(90_000)).done(Lab.map("second"), 2);
      assertEquals(JobState.WAITING, report().jobs().get(1).progress().state());
      assertEquals(1e-10, report().samples().get(0).charge().coulombs(), 1e-16);
    }
  }

  @Test
  void aDoseReportListsEveryGrantOfItsSample() {
    Delivery never = Lab.planned(Lab.map("second"), Done.NOTHING, 2);
    lab.submit(Lab.map("first"), Lab.map("second")).at(Lab.OPENS.plusSeconds(900));
    lab.done(Lab.map("first"), 1).open(never);
    lab.write(new Entry.GrantVoided(2, "sst-07", false, "it was never sent"));
    DoseReport dose =
        DoseReport.of("sst-07", Books.of(lab.entries()), lab.entries(), Lab.ZONE).orElseThrow();
    assertEquals(
        List.of("booked", "void"),
        dose.grants().stream().map(line -> line.state().text()).toList());
    assertTrue(dose.grants().get(0).counts());
    assertFalse(dose.grants().get(1).counts());
    assertEquals(Set.of(), Set.copyOf(missing()));
  }

  private List<DoseReport> missing() {
    return DoseReport.of("nothing", Books.of(lab.entries()), lab.entries(), Lab.ZONE).stream()
        .toList();
  }
}
