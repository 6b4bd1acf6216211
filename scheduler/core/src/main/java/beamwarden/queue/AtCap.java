package beamwarden.queue;

/** What a job wants when a cap does not leave room for it. */
public enum AtCap {
  /** It is refused. */
  REFUSE,
  /** What fits is done: fewer frames, or fewer lines of every filter. */
  TRIM,
  /** It is held until a person approves. */
  ASK
}
