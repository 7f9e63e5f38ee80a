/**
 * Packages: sheets of a job in one file. What one is made of is fixed when it is asked for. A trigger repeats its permitted
 * changes of state, so that there is one result at most and it stays. Parts are kept only until the result is.
 */
import type { QueryInterface } from "sequelize";

const UP = `
CREATE TABLE packages (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  job_id uuid NOT NULL,
  title text NOT NULL CHECK (length(title) BETWEEN 1 AND 200),
  state text NOT NULL CHECK (state IN ('waiting', 'making', 'ready', 'failed', 'cancelled')),
  source text NOT NULL CHECK (octet_length(source) <= 8000000),
  source_sha256 text NOT NULL CHECK (length(source_sha256) = 64),
  transmittal text CHECK (length(transmittal) BETWEEN 1 AND 40),
  -- Who makes it at present, and until when that is believed without a further word.
  worker text,
  worker_until timestamptz,
  takes integer NOT NULL DEFAULT 0,
  -- Where the result lies, or is about to.
  object_key text,
  sha256 text CHECK (length(sha256) = 64),
  bytes bigint CHECK (bytes > 0),
  pages integer CHECK (pages > 0),
  problem text CHECK (length(problem) BETWEEN 1 AND 500),
  asked_by uuid NOT NULL REFERENCES people (id),
  asked_at timestamptz NOT NULL,
  done_at timestamptz,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, job_id) REFERENCES jobs (shop_id, id),
  CHECK ((state = 'ready') = (sha256 IS NOT NULL AND bytes IS NOT NULL)),
  CHECK (state <> 'ready' OR (object_key IS NOT NULL AND object_key LIKE '%/' || sha256)),
  CHECK ((state = 'failed') = (problem IS NOT NULL)),
  CHECK ((state IN ('ready', 'failed', 'cancelled')) = (done_at IS NOT NULL)),
  CHECK ((state = 'making') = (worker IS NOT NULL AND worker_until IS NOT NULL))
);
CREATE INDEX packages_job ON packages (shop_id, job_id, asked_at);
CREATE INDEX packages_open ON packages (worker_until) WHERE state IN ('waiting', 'making');
-- A transmittal's number is used once in a job.
CREATE UNIQUE INDEX packages_transmittal ON packages (shop_id, job_id, transmittal) WHERE state NOT IN ('failed', 'cancelled');

CREATE FUNCTION packages_guard() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.state IN ('ready', 'failed', 'cancelled') THEN
    RAISE EXCEPTION 'a package that is % does not change', OLD.state USING ERRCODE = 'check_violation';
  END IF;
  IF OLD.state IS DISTINCT FROM NEW.state AND (OLD.state || '>' || NEW.state) NOT IN (
    'waiting>making', 'waiting>cancelled', 'waiting>failed', 'making>waiting', 'making>ready', 'making>failed', 'making>cancelled'
  ) THEN
    RAISE EXCEPTION 'a package does not go from % to %', OLD.state, NEW.state USING ERRCODE = 'check_violation';
  END IF;
  IF (NEW.shop_id, NEW.id, NEW.job_id, NEW.title, NEW.source, NEW.source_sha256, NEW.transmittal, NEW.asked_by, NEW.asked_at)
     IS DISTINCT FROM (OLD.shop_id, OLD.id, OLD.job_id, OLD.title, OLD.source, OLD.source_sha256, OLD.transmittal, OLD.asked_by, OLD.asked_at) THEN
    RAISE EXCEPTION 'what a package was asked for as does not change' USING ERRCODE = 'check_violation';
  END IF;
  RETURN NEW;
END $$;
CREATE TRIGGER packages_guard BEFORE UPDATE ON packages FOR EACH ROW EXECUTE FUNCTION packages_guard();

CREATE TABLE package_sheets (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  package_id uuid NOT NULL,
  ordinal integer NOT NULL CHECK (ordinal >= 0),
  sheet_id uuid NOT NULL,
  -- The state its page shows: that of the moment it was asked for.
  state text NOT NULL,
  hold boolean NOT NULL,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, package_id) REFERENCES packages (shop_id, id),
  FOREIGN KEY (shop_id, sheet_id) REFERENCES revision_sheets (shop_id, id),
  UNIQUE (shop_id, package_id, ordinal),
  UNIQUE (shop_id, package_id, sheet_id)
);
CREATE INDEX package_sheets_sheet ON package_sheets (shop_id, sheet_id);

-- Written before its object is stored, so that no object is ever left that no row knows.
CREATE TABLE package_parts (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  package_id uuid NOT NULL,
  ordinal integer NOT NULL CHECK (ordinal >= 0),
  sheets integer NOT NULL CHECK (sheets > 0),
  pages integer NOT NULL CHECK (pages >= 0),
  object_key text NOT NULL,
  stored_at timestamptz,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, package_id) REFERENCES packages (shop_id, id)
);
CREATE UNIQUE INDEX package_parts_one ON package_parts (shop_id, package_id, ordinal) WHERE stored_at IS NOT NULL;
CREATE INDEX package_parts_key ON package_parts (shop_id, package_id, ordinal);

-- What the recipient of a transmittal answered, once.
CREATE TABLE package_receipts (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  package_id uuid NOT NULL,
  received_by text NOT NULL CHECK (length(received_by) BETWEEN 1 AND 120),
  received_on date NOT NULL,
  remark text NOT NULL DEFAULT '' CHECK (length(remark) <= 1000),
  by uuid NOT NULL REFERENCES people (id),
  at timestamptz NOT NULL,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, package_id) REFERENCES packages (shop_id, id),
  UNIQUE (shop_id, package_id)
);

-- Copies that were taken as part of a package.
ALTER TABLE sheet_copies ADD COLUMN package_id uuid;
ALTER TABLE sheet_copies ADD FOREIGN KEY (shop_id, package_id) REFERENCES packages (shop_id, id);
CREATE INDEX sheet_copies_package ON sheet_copies (shop_id, package_id) WHERE package_id IS NOT NULL;

GRANT SELECT, INSERT ON packages, package_sheets, package_parts, package_receipts TO quarterline_app;
GRANT UPDATE (state, worker, worker_until, takes, object_key, sha256, bytes, pages, problem, done_at) ON packages TO quarterline_app;
GRANT UPDATE (stored_at) ON package_parts TO quarterline_app;
GRANT DELETE ON package_parts TO quarterline_app;
`;

const DOWN = `
ALTER TABLE sheet_copies DROP COLUMN package_id;
DROP TABLE package_receipts, package_parts, package_sheets, packages;
DROP FUNCTION packages_guard();
`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(DOWN);
}
