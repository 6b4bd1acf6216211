-- The books: entries are added at the end, and never changed or taken out.

CREATE TABLE schema_version (
  version INTEGER PRIMARY KEY
) STRICT;

CREATE TABLE store (
  only_row INTEGER PRIMARY KEY CHECK (only_row = 1),
  id TEXT NOT NULL
) STRICT;

-- The fencing number that holds for each instrument. No number is given twice in a store.
CREATE TABLE fence (
  instrument TEXT PRIMARY KEY,
  fence INTEGER NOT NULL UNIQUE CHECK (fence > 0)
) STRICT, WITHOUT ROWID;

CREATE TABLE entry (
  number INTEGER PRIMARY KEY,
  at TEXT NOT NULL,
  fence INTEGER NOT NULL,
  chain TEXT NOT NULL,
  kind TEXT NOT NULL,
  format INTEGER NOT NULL,
  body TEXT NOT NULL,
  hash TEXT NOT NULL
) STRICT;

CREATE INDEX entry_by_chain ON entry (chain, number);

CREATE TRIGGER entry_is_never_changed BEFORE UPDATE ON entry
BEGIN
  SELECT RAISE(ABORT, 'entries are never changed: a correction is a new entry');
END;

CREATE TRIGGER entry_is_never_taken_out BEFORE DELETE ON entry
BEGIN
  SELECT RAISE(ABORT, 'entries are never taken out: a correction is a new entry');
END;

-- Also keeps INSERT OR REPLACE from overwriting an entry: it would not fire the trigger above.
CREATE TRIGGER entry_is_added_at_the_end BEFORE INSERT ON entry
WHEN NEW.number <> (SELECT coalesce(max(number), 0) + 1 FROM entry)
BEGIN
  SELECT RAISE(ABORT, 'entries are numbered without a gap');
END;

CREATE TRIGGER fence_only_rises BEFORE UPDATE ON fence
WHEN NEW.fence <= OLD.fence OR NEW.instrument <> OLD.instrument
BEGIN
  SELECT RAISE(ABORT, 'a fence only rises');
END;

CREATE TRIGGER fence_is_never_taken_out BEFORE DELETE ON fence
BEGIN
  SELECT RAISE(ABORT, 'a fence is never taken out');
END;

CREATE TRIGGER store_is_never_renamed BEFORE UPDATE ON store
BEGIN
  SELECT RAISE(ABORT, 'a store keeps its id');
END;

CREATE TRIGGER store_is_never_taken_out BEFORE DELETE ON store
BEGIN
  SELECT RAISE(ABORT, 'a store keeps its id');
END;
