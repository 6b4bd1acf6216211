package beamwarden.report;

import beamwarden.beam.Exposure;
import beamwarden.dose.Delivery;
import beamwarden.instrument.Receipt;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.GrantState;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.Recorded;
import beamwarden.run.Exposing;
import java.time.Instant;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;

/** Makes night and job reports from recorded entries. Pure. */
public final class NightReports {
  private final String instrument;
  private final ZoneId zone;

  /**
   * Reports of one instrument.
   *
   * @param instrument its name
   * @param zone the lab's time zone
   */
  public NightReports(String instrument, ZoneId zone) {
    this.instrument = instrument;
    this.zone = zone;
  }

  /**
   * The report of a night.
   *
   * @param night the night
   * @param entries all entries of the store, in order
   * @param exposing what is being exposed, when the night is under way
   * @param now the moment of the report
   */
  public NightReport of(
      Night night, List<Recorded> entries, Optional<Exposing> exposing, Instant now) {
    List<Recorded> known =
        entries.stream().takeWhile(recorded -> recorded.at().isBefore(night.until())).toList();
    Books books = Books.of(known);
    Collection<GrantLine> grants = GrantLines.of(known);
    boolean open = night.shifts().stream().anyMatch(shift -> shift.covers(now));
    Progress progress = new Progress(books, exposing, now, open);
    List<Recorded> within = within(known, night);
    return new NightReport(
        instrument,
        night,
        zone,
        books.jobs().stream()
            .filter(record -> record.ended().filter(night.from()::isAfter).isEmpty())
            .map(record -> job(record, books, grants, progress))
            .toList(),
        books.samples().stream().map(SampleReport::of).toList(),
        events(within),
        grants.stream()
            .filter(grant -> grant.state() == GrantState.PRESUMED)
            .filter(grant -> !grant.openedAt().isBefore(night.from()))
            .toList(),
        readings(within),
        files(within));
  }

  /** The report of one job; empty when the books do not know it. */
  public static Optional<JobReport> job(
      String id, Books books, List<Recorded> entries, Progress progress) {
    return books.job(id).map(record -> job(record, books, GrantLines.of(entries), progress));
  }

  private static JobReport job(
      JobRecord record, Books books, Collection<GrantLine> grants, Progress progress) {
    List<Delivery> own =
        grants.stream()
            .filter(GrantLine::counts)
            .filter(grant -> grant.job().equals(record.job().id()))
            .map(GrantLine::counted)
            .toList();
    return new JobReport(
        progress.of(record),
        DoseAlone.of(books.sample(record.job().sample()).orElseThrow().sample(), own));
  }

  private static List<Recorded> within(List<Recorded> known, Night night) {
    return known.stream().filter(recorded -> !recorded.at().isBefore(night.from())).toList();
  }

  private static List<NightEvent> events(List<Recorded> entries) {
    return entries.stream()
        .flatMap(recorded -> event(recorded.entry(), recorded.at()).stream())
        .toList();
  }

  private static Optional<NightEvent> event(Entry entry, Instant at) {
    if (entry instanceof Entry.Noted noted) {
      return switch (noted.what()) {
        case FAULT, STOPPED, GOES_ON -> Optional.of(new NightEvent(at, kind(noted), noted.text()));
        case SHIFT_OPENED, SHIFT_CLOSED, WOUND_DOWN -> Optional.empty();
      };
    }
    if (entry instanceof Entry.Approved approved) {
      String text = approved.thing() + " approved: " + approved.reason();
      return Optional.of(new NightEvent(at, "approved", text));
    }
    if (entry instanceof Entry.SessionSeen seen && !seen.first()) {
      return Optional.of(new NightEvent(at, "session", "the chamber was touched"));
    }
    return Optional.empty();
  }

  private static String kind(Entry.Noted noted) {
    return noted.what().name().toLowerCase(Locale.ROOT).replace('_', '-');
  }

  private static List<NightReport.Reading> readings(List<Recorded> entries) {
    List<NightReport.Reading> readings = new ArrayList<>();
    for (Recorded recorded : entries) {
      if (recorded.entry() instanceof Entry.CurrentMeasured measured) {
        readings.add(new NightReport.Reading(recorded.at(), measured.reading()));
      }
    }
    return readings;
  }

  /** A receipt that was booked twice, because a reading raised it, names its files once. */
  private static List<NightReport.File> files(List<Recorded> entries) {
    Map<Long, List<NightReport.File>> byGrant = new LinkedHashMap<>();
    for (Recorded recorded : entries) {
      if (recorded.entry() instanceof Entry.GrantBooked booked) {
        byGrant.put(
            booked.receipt().grant(), files(booked.delivered().exposure(), booked.receipt()));
      } else if (recorded.entry() instanceof Entry.GrantPresumed presumed) {
        presumed
            .receipt()
            .ifPresent(
                receipt ->
                    byGrant.put(receipt.grant(), files(presumed.atMost().exposure(), receipt)));
      }
    }
    return byGrant.values().stream().flatMap(List::stream).toList();
  }

  private static List<NightReport.File> files(Exposure exposure, Receipt receipt) {
    return receipt.files().stream()
        .map(file -> new NightReport.File(exposure.job(), receipt.grant(), file))
        .toList();
  }
}
