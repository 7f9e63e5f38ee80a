/**
 * Revisions of spools, what each was frozen from, its stored PDFs, who signed, and the work recorded against it.
 * A trigger repeats the permitted changes of state, so that no program has a second door.
 */
import type { QueryInterface } from "sequelize";

const UP = `
CREATE TABLE revisions (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  spool_id uuid NOT NULL,
  code text NOT NULL CHECK (length(code) BETWEEN 1 AND 6),
  ordinal integer NOT NULL CHECK (ordinal >= 1),
  state text NOT NULL CHECK (state IN ('draft', 'for-review', 'returned', 'for-fabrication', 'superseded', 'void', 'as-built')),
  hold boolean NOT NULL DEFAULT false,
  hold_reason text CHECK (length(hold_reason) <= 2000),
  description text NOT NULL CHECK (length(description) <= 2000),
  line_version integer NOT NULL CHECK (line_version >= 1),
  content_sha256 text NOT NULL CHECK (length(content_sha256) = 64),
  status_token text NOT NULL UNIQUE CHECK (length(status_token) >= 20),
  submitted_by uuid NOT NULL REFERENCES people (id),
  submitted_at timestamptz NOT NULL,
  signed_by uuid REFERENCES people (id),
  signed_at timestamptz,
  return_reason text CHECK (length(return_reason) <= 2000),
  void_reason text CHECK (length(void_reason) <= 2000),
  state_at timestamptz NOT NULL,
  state_by uuid NOT NULL REFERENCES people (id),
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, spool_id) REFERENCES spools (shop_id, id),
  UNIQUE (shop_id, spool_id, code),
  UNIQUE (shop_id, spool_id, ordinal),
  CHECK (NOT hold OR hold_reason IS NOT NULL),
  CHECK ((signed_by IS NULL) = (signed_at IS NULL)),
  CHECK (signed_by IS NULL OR signed_by <> submitted_by),
  CHECK (state NOT IN ('for-fabrication', 'superseded', 'as-built') OR signed_by IS NOT NULL),
  CHECK (state <> 'returned' OR return_reason IS NOT NULL),
  CHECK (state <> 'void' OR void_reason IS NOT NULL)
);
CREATE UNIQUE INDEX revisions_one_open ON revisions (shop_id, spool_id) WHERE state IN ('draft', 'for-review');
CREATE UNIQUE INDEX revisions_one_live ON revisions (shop_id, spool_id) WHERE state IN ('for-fabrication', 'as-built');

CREATE FUNCTION revisions_guard() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP = 'INSERT' THEN
    IF NEW.state NOT IN ('draft', 'for-review') THEN
      RAISE EXCEPTION 'a revision starts as draft or for-review, not %', NEW.state USING ERRCODE = 'check_violation';
    END IF;
    RETURN NEW;
  END IF;
  IF OLD.state IN ('returned', 'superseded', 'void') THEN
    RAISE EXCEPTION 'a revision that is % does not change', OLD.state USING ERRCODE = 'check_violation';
  END IF;
  IF OLD.state IS DISTINCT FROM NEW.state AND (OLD.state || '>' || NEW.state) NOT IN (
    'draft>for-review', 'for-review>returned', 'for-review>for-fabrication', 'for-review>void',
    'for-fabrication>superseded', 'for-fabrication>void', 'for-fabrication>as-built',
    'as-built>superseded', 'as-built>void'
  ) THEN
    RAISE EXCEPTION 'a revision does not go from % to %', OLD.state, NEW.state USING ERRCODE = 'check_violation';
  END IF;
  IF (NEW.shop_id, NEW.id, NEW.spool_id, NEW.code, NEW.ordinal, NEW.description, NEW.line_version, NEW.content_sha256,
      NEW.status_token, NEW.submitted_by, NEW.submitted_at)
     IS DISTINCT FROM
     (OLD.shop_id, OLD.id, OLD.spool_id, OLD.code, OLD.ordinal, OLD.description, OLD.line_version, OLD.content_sha256,
      OLD.status_token, OLD.submitted_by, OLD.submitted_at) THEN
    RAISE EXCEPTION 'what a revision was submitted as does not change' USING ERRCODE = 'check_violation';
  END IF;
  IF OLD.signed_by IS NOT NULL AND (NEW.signed_by, NEW.signed_at) IS DISTINCT FROM (OLD.signed_by, OLD.signed_at) THEN
    RAISE EXCEPTION 'a signature does not change' USING ERRCODE = 'check_violation';
  END IF;
  RETURN NEW;
END $$;
CREATE TRIGGER revisions_guard BEFORE INSERT OR UPDATE ON revisions FOR EACH ROW EXECUTE FUNCTION revisions_guard();

CREATE TABLE revision_inputs (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  revision_id uuid NOT NULL,
  kind text NOT NULL CHECK (kind IN ('review', 'fabrication')),
  input text NOT NULL,
  sha256 text NOT NULL CHECK (length(sha256) = 64),
  content_key text NOT NULL,
  at timestamptz NOT NULL,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, revision_id) REFERENCES revisions (shop_id, id),
  UNIQUE (shop_id, revision_id, kind)
);

CREATE TABLE revision_sheets (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  revision_id uuid NOT NULL,
  kind text NOT NULL CHECK (kind IN ('review', 'fabrication')),
  sha256 text NOT NULL CHECK (length(sha256) = 64),
  bytes integer NOT NULL CHECK (bytes > 0),
  object_key text NOT NULL,
  audit_seq bigint NOT NULL,
  audit_hash text NOT NULL,
  at timestamptz NOT NULL,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, revision_id) REFERENCES revisions (shop_id, id),
  UNIQUE (shop_id, revision_id, kind)
);
CREATE INDEX revision_sheets_sha256 ON revision_sheets (sha256);

-- Marked copies are stamped when printed and not kept; their hashes are, so that one can be recognised.
CREATE TABLE sheet_copies (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  sheet_id uuid NOT NULL,
  sha256 text NOT NULL CHECK (length(sha256) = 64),
  marked text NOT NULL,
  at timestamptz NOT NULL,
  by uuid NOT NULL REFERENCES people (id),
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, sheet_id) REFERENCES revision_sheets (shop_id, id)
);
CREATE INDEX sheet_copies_sha256 ON sheet_copies (sha256);

CREATE TABLE sign_offs (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  revision_id uuid NOT NULL,
  person_id uuid NOT NULL REFERENCES people (id),
  decision text NOT NULL CHECK (decision IN ('signed', 'returned')),
  reason text NOT NULL DEFAULT '' CHECK (length(reason) <= 2000),
  accepted text NOT NULL DEFAULT '[]',
  input_sha256 text NOT NULL CHECK (length(input_sha256) = 64),
  at timestamptz NOT NULL,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, revision_id) REFERENCES revisions (shop_id, id),
  UNIQUE (shop_id, revision_id)
);

CREATE TABLE work_entries (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  spool_id uuid NOT NULL,
  revision_id uuid NOT NULL,
  kind text NOT NULL CHECK (kind IN ('cut', 'fit-up', 'weld', 'visual', 'actual')),
  mark text NOT NULL CHECK (length(mark) BETWEEN 1 AND 60),
  key text NOT NULL CHECK (length(key) BETWEEN 1 AND 200),
  entry_values text NOT NULL CHECK (octet_length(entry_values) <= 20000),
  by uuid NOT NULL REFERENCES people (id),
  at timestamptz NOT NULL,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, spool_id) REFERENCES spools (shop_id, id),
  FOREIGN KEY (shop_id, revision_id) REFERENCES revisions (shop_id, id)
);
CREATE INDEX work_entries_spool ON work_entries (shop_id, spool_id, at);
`;

const DOWN = `
DROP TABLE work_entries, sign_offs, sheet_copies, revision_sheets, revision_inputs, revisions;
DROP FUNCTION revisions_guard();
`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(DOWN);
}
