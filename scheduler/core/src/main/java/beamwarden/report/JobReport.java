package beamwarden.report;

/**
 * One job: where it stands, and what it gave its sample.
 *
 * @param progress where it stands
 * @param dose what it gave
 */
public record JobReport(JobProgress progress, DoseAlone dose) {}
