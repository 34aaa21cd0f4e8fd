-- Why: the record of the main job. A case is what is planned for, a regimen is one alternative in it, a
-- revision is what somebody saved, for ever.
--
-- Every column is NOT NULL or says why not: the driver binds NaN and undefined as NULL without an error,
-- so a number that was lost on the way must fail here. Every row has a seal, the SHA-256 of its own
-- values, because almost half of all single changed bits pass integrity_check.

CREATE TABLE case_record (
  id TEXT NOT NULL PRIMARY KEY CHECK (length(id) = 36),
  version INTEGER NOT NULL CHECK (version >= 1),
  label TEXT NOT NULL CHECK (length(label) >= 1),
  time_zone TEXT NOT NULL CHECK (length(time_zone) >= 3),
  notes TEXT NOT NULL,
  -- NULL until kinetics and plan are entered: a case may be made first and filled later.
  setting TEXT CHECK (setting IS NULL OR json_valid(setting)),
  archived INTEGER NOT NULL CHECK (archived IN (0, 1)),
  demo INTEGER NOT NULL CHECK (demo IN (0, 1)),
  created_at TEXT NOT NULL CHECK (length(created_at) >= 20),
  changed_at TEXT NOT NULL CHECK (length(changed_at) >= 20),
  seal TEXT NOT NULL CHECK (length(seal) = 64)
) STRICT;

CREATE INDEX case_record_by_change ON case_record (archived, changed_at);

CREATE TABLE regimen (
  id TEXT NOT NULL PRIMARY KEY CHECK (length(id) = 36),
  case_id TEXT NOT NULL REFERENCES case_record (id),
  -- The order in which the alternatives of a case were made: two may be made in one millisecond.
  position INTEGER NOT NULL CHECK (position >= 1),
  label TEXT NOT NULL CHECK (length(label) >= 1),
  retired INTEGER NOT NULL CHECK (retired IN (0, 1)),
  created_at TEXT NOT NULL CHECK (length(created_at) >= 20),
  seal TEXT NOT NULL CHECK (length(seal) = 64),
  UNIQUE (case_id, position),
  -- Lets a revision name its case and its regimen together, so that they cannot disagree.
  UNIQUE (id, case_id)
) STRICT;

CREATE TABLE revision (
  id TEXT NOT NULL PRIMARY KEY CHECK (length(id) = 36),
  case_id TEXT NOT NULL,
  regimen_id TEXT NOT NULL,
  number INTEGER NOT NULL CHECK (number >= 1),
  created_at TEXT NOT NULL CHECK (length(created_at) >= 20),
  reason TEXT NOT NULL CHECK (length(reason) >= 3),
  prepared_by TEXT NOT NULL CHECK (length(prepared_by) >= 1),
  content TEXT NOT NULL CHECK (json_valid(content)),
  content_hash TEXT NOT NULL CHECK (length(content_hash) = 64),
  largest_difference_mg_per_l REAL NOT NULL CHECK (largest_difference_mg_per_l >= 0),
  largest_difference_at_h REAL NOT NULL CHECK (largest_difference_at_h >= 0),
  largest_level_mg_per_l REAL NOT NULL CHECK (largest_level_mg_per_l >= 0),
  relative_difference REAL NOT NULL CHECK (relative_difference >= 0),
  points_compared INTEGER NOT NULL CHECK (points_compared >= 1),
  seal TEXT NOT NULL CHECK (length(seal) = 64),
  UNIQUE (regimen_id, number),
  FOREIGN KEY (regimen_id, case_id) REFERENCES regimen (id, case_id)
) STRICT;

CREATE TRIGGER revision_never_changes BEFORE UPDATE ON revision
BEGIN
  SELECT RAISE (ABORT, 'a revision is never changed');
END;

CREATE TRIGGER revision_never_goes BEFORE DELETE ON revision
BEGIN
  SELECT RAISE (ABORT, 'a revision is never deleted');
END;

-- What a write answered, by the key its client made, so that a retry after a lost answer is recognised.
CREATE TABLE answered_write (
  key TEXT NOT NULL PRIMARY KEY CHECK (length(key) = 36),
  fingerprint TEXT NOT NULL CHECK (length(fingerprint) = 64),
  answer TEXT NOT NULL CHECK (json_valid(answer)),
  answered_at TEXT NOT NULL CHECK (length(answered_at) >= 20)
) STRICT, WITHOUT ROWID;

CREATE INDEX answered_write_by_time ON answered_write (answered_at);

-- Things that are done once in the life of a file, such as putting in the demo case.
CREATE TABLE milestone (
  name TEXT NOT NULL PRIMARY KEY CHECK (length(name) >= 1),
  reached_at TEXT NOT NULL CHECK (length(reached_at) >= 20)
) STRICT, WITHOUT ROWID;
