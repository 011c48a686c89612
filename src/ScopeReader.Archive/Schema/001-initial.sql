-- What is kept for ever: the captures' bytes and the ledger of records. Nothing here is changed once it is written.

CREATE TABLE capture (
    id      INTEGER PRIMARY KEY,
    sha256  BLOB NOT NULL UNIQUE CHECK (length(sha256) = 32), -- of the original bytes
    length  INTEGER NOT NULL,                                 -- of the original bytes
    packed  BLOB NOT NULL
);

CREATE TABLE record (
    number          INTEGER PRIMARY KEY,                      -- 1, 2, 3, … without a gap
    kind            TEXT NOT NULL CHECK (kind IN ('entry', 'amendment', 'measurement')),
    entry           INTEGER NOT NULL,                         -- the entry that it makes or concerns
    at              TEXT NOT NULL,                            -- UTC, ISO 8601
    capture         INTEGER REFERENCES capture (id),          -- of kind entry
    content_sha256  BLOB NOT NULL CHECK (length(content_sha256) = 32),
    hash            BLOB NOT NULL UNIQUE CHECK (length(hash) = 32), -- chains to the record before
    content         BLOB NOT NULL                             -- JSON in UTF-8, Zstandard
);
CREATE INDEX record_by_entry ON record (entry, number);

CREATE TRIGGER record_is_permanent BEFORE UPDATE ON record BEGIN SELECT RAISE(ABORT, 'records are never changed'); END;
CREATE TRIGGER record_stays BEFORE DELETE ON record BEGIN SELECT RAISE(ABORT, 'records are never deleted'); END;
CREATE TRIGGER capture_is_permanent BEFORE UPDATE ON capture BEGIN SELECT RAISE(ABORT, 'captures are never changed'); END;
CREATE TRIGGER capture_stays BEFORE DELETE ON capture BEGIN SELECT RAISE(ABORT, 'captures are never deleted'); END;

-- What makes it quick to search: each entry as its records leave it. All of it can be made again from the ledger.

CREATE TABLE entry (
    number       INTEGER PRIMARY KEY,
    capture      INTEGER NOT NULL REFERENCES capture (id),
    file         TEXT NOT NULL,
    subject      TEXT COLLATE NOCASE,
    serial       TEXT COLLATE NOCASE,
    operator     TEXT COLLATE NOCASE,
    instrument   TEXT COLLATE NOCASE,
    captured_at  TEXT NOT NULL,
    added_at     TEXT NOT NULL,
    outcome      TEXT NOT NULL
);
CREATE INDEX entry_by_capture ON entry (capture);
CREATE INDEX entry_by_subject ON entry (subject, captured_at);
CREATE INDEX entry_by_date ON entry (captured_at);
CREATE INDEX entry_by_outcome ON entry (outcome, captured_at);

CREATE TABLE tag (
    entry  INTEGER NOT NULL REFERENCES entry (number),
    tag    TEXT NOT NULL COLLATE NOCASE,
    PRIMARY KEY (entry, tag)
) WITHOUT ROWID;
CREATE INDEX tag_by_name ON tag (tag);

CREATE TABLE condition (
    entry  INTEGER NOT NULL REFERENCES entry (number),
    name   TEXT NOT NULL,
    value  REAL NOT NULL,
    unit   TEXT NOT NULL,
    PRIMARY KEY (entry, name)
) WITHOUT ROWID;
CREATE INDEX condition_by_value ON condition (name, unit, value);

CREATE TABLE quantity (
    id    INTEGER PRIMARY KEY,
    name  TEXT NOT NULL UNIQUE
);

CREATE TABLE reading ( -- the primary ones of the latest measurement
    entry          INTEGER NOT NULL REFERENCES entry (number),
    quantity       INTEGER NOT NULL REFERENCES quantity (id),
    channel        TEXT NOT NULL,
    segment        INTEGER NOT NULL,
    value          REAL NOT NULL,
    unit           TEXT NOT NULL,
    expanded       REAL NOT NULL,
    repeatability  REAL NOT NULL,
    method         TEXT NOT NULL,
    PRIMARY KEY (entry, quantity, channel, segment)
) WITHOUT ROWID;
CREATE INDEX reading_by_value ON reading (quantity, value);

CREATE VIRTUAL TABLE entry_text USING fts5 (subject, serial, operator, instrument, notes, tags, file, findings, tokenize = 'unicode61 remove_diacritics 2');
