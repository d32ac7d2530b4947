/** The first notebook: documents kept for good, drafts that save themselves, sessions, rehearsals with their traces. */
export const begin = `
CREATE TABLE version (
  version_id INTEGER PRIMARY KEY,
  kind TEXT NOT NULL CHECK (kind IN ('cell', 'rig', 'protocol', 'plan')),
  name TEXT NOT NULL,
  document TEXT NOT NULL,
  hash TEXT NOT NULL CHECK (length(hash) = 64),
  made_at TEXT NOT NULL,
  UNIQUE (kind, hash)
) STRICT;
CREATE TRIGGER version_stays BEFORE UPDATE ON version BEGIN SELECT RAISE(ABORT, 'a version never changes'); END;
CREATE TRIGGER version_is_kept BEFORE DELETE ON version BEGIN SELECT RAISE(ABORT, 'a version is never deleted'); END;

CREATE TABLE cell (
  cell_id INTEGER PRIMARY KEY,
  name TEXT NOT NULL,
  note TEXT NOT NULL,
  draft TEXT NOT NULL,
  hash TEXT NOT NULL CHECK (length(hash) = 64),
  changed_at TEXT NOT NULL,
  removed INTEGER NOT NULL DEFAULT 0 CHECK (removed IN (0, 1))
) STRICT;
CREATE INDEX cell_by_hash ON cell (hash);

CREATE TABLE plan (
  plan_id INTEGER PRIMARY KEY,
  cell_id INTEGER NOT NULL REFERENCES cell,
  name TEXT NOT NULL,
  note TEXT NOT NULL,
  draft TEXT NOT NULL,
  -- Of the draft's cell: tells an edit of the cell from an edit of the rest.
  cell_hash TEXT NOT NULL CHECK (length(cell_hash) = 64),
  changed_at TEXT NOT NULL,
  removed INTEGER NOT NULL DEFAULT 0 CHECK (removed IN (0, 1))
) STRICT;
CREATE INDEX plan_by_cell ON plan (cell_id);

CREATE TABLE session (
  session_id INTEGER PRIMARY KEY,
  cell_id INTEGER NOT NULL REFERENCES cell,
  date TEXT NOT NULL,
  title TEXT NOT NULL,
  notes TEXT NOT NULL,
  changed_at TEXT NOT NULL
) STRICT;
CREATE INDEX session_by_cell ON session (cell_id);

CREATE TABLE rehearsal (
  rehearsal_id INTEGER PRIMARY KEY,
  plan_id INTEGER NOT NULL REFERENCES plan,
  session_id INTEGER REFERENCES session,
  plan_version INTEGER NOT NULL REFERENCES version,
  cell_version INTEGER NOT NULL REFERENCES version,
  rig_version INTEGER NOT NULL REFERENCES version,
  protocol_version INTEGER NOT NULL REFERENCES version,
  engine_version TEXT NOT NULL,
  rehearsed_at TEXT NOT NULL,
  sweeps INTEGER NOT NULL,
  step_us REAL NOT NULL,
  compartments INTEGER NOT NULL,
  wall_s REAL NOT NULL,
  forecast BLOB NOT NULL
) STRICT;
CREATE INDEX rehearsal_by_plan ON rehearsal (plan_id);
CREATE INDEX rehearsal_by_session ON rehearsal (session_id);
CREATE TRIGGER rehearsal_stays BEFORE UPDATE ON rehearsal BEGIN SELECT RAISE(ABORT, 'a rehearsal never changes'); END;

-- Samples are 64-bit floats, little endian.
CREATE TABLE trace (
  trace_id INTEGER PRIMARY KEY,
  rehearsal_id INTEGER NOT NULL REFERENCES rehearsal,
  sweep INTEGER NOT NULL,
  key TEXT NOT NULL,
  unit TEXT NOT NULL CHECK (unit IN ('mV', 'pA')),
  start_ms REAL NOT NULL,
  interval_ms REAL NOT NULL,
  samples BLOB NOT NULL,
  UNIQUE (rehearsal_id, sweep, key)
) STRICT;

-- Arrives after its rehearsal, from the finer run.
CREATE TABLE numerical (
  rehearsal_id INTEGER PRIMARY KEY REFERENCES rehearsal,
  clamp_error_mV REAL,
  reach REAL
) STRICT;

CREATE TABLE setting (name TEXT PRIMARY KEY, value TEXT NOT NULL) STRICT;
`;
