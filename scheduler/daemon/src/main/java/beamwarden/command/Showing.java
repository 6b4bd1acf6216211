package beamwarden.command;

import beamwarden.answer.EntryAnswer;

/** How a watcher shows what it hears. */
interface Showing {
  /** Shows the board as it stands at the beginning, and after each connection. */
  void begin(Board board);

  /** Shows an entry, which the board has taken in. */
  void entry(Board board, EntryAnswer told);

  /** Shows that a job has moved on, which the board has taken in. */
  void progress(Board board, String job, String json);
}
