package beamwarden.answer;

import beamwarden.report.NightEvent;
import beamwarden.report.NightReport;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.time.Instant;
import java.util.List;

/**
 * What was done in a night, and what was not done and why.
 *
 * @param night the local date on which it opened
 * @param instrument the instrument's name
 * @param timeZone the lab's time zone
 * @param shifts its shifts
 * @param jobs its jobs
 * @param samples all samples
 * @param faults faults, stops and approvals, in order
 * @param files its data files
 * @param presumed grants whose outcome is not known; they count in full
 * @param readings its current readings
 * @param notDone the jobs that are not wholly done
 */
public record NightAnswer(
    @JsonProperty("night") String night,
    @JsonProperty("instrument") String instrument,
    @JsonProperty("time_zone") String timeZone,
    @JsonProperty("shifts") List<ShiftAnswer> shifts,
    @JsonProperty("jobs") List<JobAnswer> jobs,
    @JsonProperty("samples") List<SampleAnswer> samples,
    @JsonProperty("faults") List<Happening> faults,
    @JsonProperty("files") List<File> files,
    @JsonProperty("presumed") List<GrantAnswer> presumed,
    @JsonProperty("readings") List<Reading> readings,
    @JsonProperty("not_done") List<NotDone> notDone) {
  /**
   * Something that happened in a night.
   *
   * @param at when
   * @param kind fault, stopped, goes-on, approved or session
   * @param text one sentence
   */
  public record Happening(
      @JsonProperty("at") Instant at,
      @JsonProperty("kind") String kind,
      @JsonProperty("text") String text) {
    static Happening of(NightEvent event) {
      return new Happening(event.at(), event.kind(), event.text());
    }
  }

  /**
   * A data file.
   *
   * @param path where it lies
   * @param type its media type
   * @param bytes its size
   * @param sha256 its SHA-256 in hexadecimal
   * @param job the id of its job
   * @param grant the number of its grant
   */
  public record File(
      @JsonProperty("path") String path,
      @JsonProperty("type") String type,
      @JsonProperty("bytes") long bytes,
      @JsonProperty("sha256") String sha256,
      @JsonProperty("job") String job,
      @JsonProperty("grant") long grant) {
    static File of(NightReport.File known) {
      return new File(
          known.file().path(),
          known.file().type(),
          known.file().bytes(),
          known.file().sha256(),
          known.job(),
          known.grant());
    }
  }

  /**
   * A current reading.
   *
   * @param at when it was stored
   * @param setAmperes what the column was set to
   * @param readAmperes what the meter showed
   * @param volts the accelerating voltage
   */
  public record Reading(
      @JsonProperty("at") Instant at,
      @JsonProperty("set_A") double setAmperes,
      @JsonProperty("read_A") double readAmperes,
      @JsonProperty("voltage_V") double volts) {
    static Reading of(NightReport.Reading known) {
      return new Reading(
          known.at(),
          known.reading().settings().current().amperes(),
          known.reading().current().amperes(),
          known.reading().settings().voltage().volts());
    }
  }

  /**
   * A job that is not wholly done.
   *
   * @param id its id
   * @param state its state
   * @param why why; may be empty
   */
  public record NotDone(
      @JsonProperty("id") String id,
      @JsonProperty("state") String state,
      @JsonProperty("why") String why) {}

  /** The answer that says what a report does. */
  public static NightAnswer of(NightReport report) {
    return new NightAnswer(
        report.night().date().toString(),
        report.instrument(),
        report.zone().getId(),
        report.night().shifts().stream().map(ShiftAnswer::of).toList(),
        report.jobs().stream().map(JobAnswer::of).toList(),
        report.samples().stream().map(SampleAnswer::of).toList(),
        report.events().stream().map(Happening::of).toList(),
        report.files().stream().map(File::of).toList(),
        report.presumed().stream().map(GrantAnswer::of).toList(),
        report.readings().stream().map(Reading::of).toList(),
        report.undone().stream()
            .map(job -> job.progress())
            .map(job -> new NotDone(job.id(), job.state().text(), job.because()))
            .toList());
  }
}
