package beamwarden.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.dose.Delivery;
import beamwarden.dose.Done;
import beamwarden.instrument.CurrentReading;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.quantity.Current;
import beamwarden.queue.HeldFor;
import beamwarden.run.InstrumentState;
import java.time.LocalDate;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class PagesTest {
  private static final String LONG =
      "a-job-with-the-longest-name-that-anybody-may-give-it-64-characters";

  private final Lab lab = new Lab();

  private static void fits(String page) {
    page.lines()
        .forEach(line -> assertTrue(line.length() <= 80, line.length() + " columns: " + line));
    assertTrue(page.endsWith("\n"));
  }

  private String night() {
    Night night = Night.on(LocalDate.of(2031, 3, 12), Lab.calendar(), Lab.ZONE).orElseThrow();
    return Pages.night(
        new NightReports("north-room", Lab.ZONE)
            .of(night, lab.entries(), Optional.empty(), lab.now()));
  }

  @Test
  void aNightReadsAsAPage() {
    lab.submit(Lab.map("survey"), Lab.map("zones", "survey")).at(Lab.OPENS.plusSeconds(900));
    lab.write(
        new Entry.CurrentMeasured(
            new CurrentReading(Lab.map("survey").beam(), new Current(1.012e-9))));
    lab.done(Lab.map("survey"), 1);
    lab.note(What.FAULT, "zones: the detector did not answer within 30 s");
    lab.held("zones", HeldFor.A_PERSON, "a person holds it");
    assertEquals(
        """
        Night of 2031-03-12, north-room, times of Europe/Ljubljana
        ==========================================================
        Shift 19:00 to 07:00, unattended.

        Jobs
          job     state  began  ended  exposures   done  charge      highest
          survey   done  19:15  19:15          1  100 %  100 pC  624.2 e/nm2
          zones    held      -      -          0    0 %     0 C      0 e/nm2

        Not done, or not wholly
          zones  held: a person holds it

        Sample sst-07, quartz-cemented sandstone, polished thin section
          cap                            limit       booked        upper        left
          fluence                   9000 e/nm2  624.2 e/nm2  686.6 e/nm2  8313 e/nm2
          fluence in isotope-grain     8 e/nm2      0 e/nm2      0 e/nm2     8 e/nm2
          charge                         40 uC       100 pC       110 pC       40 uC
          charge received: 100 pC, at most 110 pC

        What happened besides
          19:15  fault: zones: the detector did not answer within 30 s

        Probe current
          current reading  set to      read  off by
          19:15              1 nA  1.012 nA  +1.2 %

        Data: 1 file, 1.02 kB, in
          data/survey (1)
        """,
        night());
  }

  @Test
  void aJobThatBeganInAnEarlierNightSaysSo() {
    Delivery half = Lab.planned(Lab.map("survey"), Done.NOTHING, 1);
    lab.submit(Lab.map("survey")).at(Lab.OPENS.minusSeconds(80_000)).open(half);
    lab.at(Lab.OPENS.plusSeconds(900)).book(half, 100, Map.of());
    assertTrue(night().contains("ready  earlier"), night());
  }

  @Test
  void everyPageFitsEightyColumnsWhateverItsNames() {
    lab.submit(Lab.map(LONG)).at(Lab.OPENS.plusSeconds(900));
    lab.done(Lab.map(LONG), 1);
    Delivery lost = Lab.planned(Lab.map(LONG), Done.NOTHING, 123_456_789);
    lab.open(lost)
        .write(new Entry.GrantPresumed(lost, "no word of it ".repeat(20), Optional.empty()))
        .note(What.STOPPED, "w".repeat(300))
        .held(LONG, HeldFor.APPROVAL, "because ".repeat(30));
    fits(night());
    Books books = Books.of(lab.entries());
    fits(Pages.dose(DoseReport.of("sst-07", books, lab.entries(), Lab.ZONE).orElseThrow()));
    fits(Pages.now(now("standing by ".repeat(20)), progress(books).jobs()));
  }

  @Test
  void whatGoesOnIsSaidInSentences() {
    lab.submit(Lab.map("survey")).at(Lab.OPENS.plusSeconds(900)).done(Lab.map("survey"), 1);
    assertEquals(
        """
        north-room at 2031-03-12 19:15, Europe/Ljubljana
        ================================================
        The instrument is exposing.
        Exposing survey, grant 1, pass 1: 40 % of this exposure.
        Shift 19:00 to 07:00, unattended.
        The next shift opens 2031-03-13 19:00.

        Jobs
          job     sample  state  exposures   done
          survey  sst-07   done          1  100 %
        """,
        Pages.now(now(""), progress(Books.of(lab.entries())).jobs()));
  }

  @Test
  void aSampleWithoutGrantsSaysSo() {
    lab.submit(Lab.map("survey"));
    Books books = Books.of(lab.entries());
    String page = Pages.dose(DoseReport.of("sst-07", books, lab.entries(), Lab.ZONE).orElseThrow());
    assertTrue(page.endsWith("Grants\n  none\n"), page);
  }

  private NightNow now(String because) {
    return new NightNow(
        "north-room",
        InstrumentState.EXPOSING,
        because,
        Optional.empty(),
        lab.now(),
        Lab.ZONE,
        Optional.of(new RunningExposure("survey", 1, 0, 40, 100)),
        Lab.calendar().current(lab.now()),
        Lab.calendar().next(lab.now()),
        false,
        lab.entries().size());
  }

  private Progress progress(Books books) {
    return new Progress(books, Optional.empty(), lab.now(), true);
  }
}
