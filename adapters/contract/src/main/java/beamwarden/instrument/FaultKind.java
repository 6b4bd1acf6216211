package beamwarden.instrument;

/** What can go wrong at an instrument, and what is to be done about each. */
public enum FaultKind {
  /** A detector or camera did not answer in time. */
  DETECTOR_TIMEOUT(Remedy.RETRY_HERE),
  /** The exposure could not start in time. */
  STARTED_TOO_LATE(Remedy.RETRY_HERE),
  /** No heartbeat came within the lease. */
  LEASE_ENDED(Remedy.RETRY_HERE),
  /** Nobody can say what was done under a grant. */
  OUTCOME_UNKNOWN(Remedy.RETRY_HERE),
  /** The focus was lost. */
  FOCUS_LOST(Remedy.RETRY_AFTER_RECOVERY),
  /** The region was not found again. */
  REGISTRATION_LOST(Remedy.RETRY_AFTER_RECOVERY),
  /** The stage cannot bring the region under the beam. */
  REGION_UNREACHABLE(Remedy.GIVE_UP_JOB),
  /** The instrument cannot do what was asked. */
  NOT_OFFERED(Remedy.GIVE_UP_JOB),
  /** A door, a vacuum lock or another interlock opened. */
  INTERLOCK(Remedy.STOP_NIGHT),
  /** The high voltage tripped. */
  HIGH_VOLTAGE_TRIP(Remedy.STOP_NIGHT),
  /** The vacuum is gone. */
  VACUUM(Remedy.STOP_NIGHT),
  /** The beam could not be blanked, or it is not known that it was. */
  BLANKER_FAILURE(Remedy.STOP_NIGHT),
  /** The probe current left its bounds. */
  CURRENT_OUT_OF_BOUNDS(Remedy.STOP_NIGHT),
  /** Two things the instrument says cannot both be true. */
  READINGS_DISAGREE(Remedy.STOP_NIGHT);

  /** What is to be done about a fault. */
  public enum Remedy {
    /** Try the same again, a bounded number of times. */
    RETRY_HERE,
    /** Prepare afresh, then try again, a bounded number of times. */
    RETRY_AFTER_RECOVERY,
    /** End this job; the night goes on. */
    GIVE_UP_JOB,
    /** Wind down; a person must come. */
    STOP_NIGHT
  }

  private final Remedy remedy;

  FaultKind(Remedy remedy) {
    this.remedy = remedy;
  }

  /** What is to be done about it. */
  public Remedy remedy() {
    return remedy;
  }
}
