/**
 * Offcuts on the rack, and cutting plans. What a plan was made from never changes; a trigger repeats its permitted changes
 * of state, so that a plan that was cut stays as it was cut.
 */
import type { QueryInterface } from "sequelize";

const UP = `
CREATE TABLE nests (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  job_id uuid NOT NULL,
  title text NOT NULL CHECK (length(title) BETWEEN 1 AND 200),
  state text NOT NULL CHECK (state IN ('waiting', 'searching', 'done', 'failed', 'cancelled', 'cut')),
  source text NOT NULL CHECK (octet_length(source) <= 8000000),
  source_sha256 text NOT NULL CHECK (length(source_sha256) = 64),
  progress text NOT NULL DEFAULT '' CHECK (length(progress) <= 2000),
  result text CHECK (octet_length(result) <= 8000000),
  asked_by uuid NOT NULL REFERENCES people (id),
  asked_at timestamptz NOT NULL,
  done_at timestamptz,
  cut_by uuid REFERENCES people (id),
  cut_at timestamptz,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, job_id) REFERENCES jobs (shop_id, id),
  CHECK ((state IN ('done', 'cut')) = (result IS NOT NULL)),
  CHECK ((state = 'cut') = (cut_at IS NOT NULL)),
  CHECK ((cut_by IS NULL) = (cut_at IS NULL))
);
CREATE INDEX nests_job ON nests (shop_id, job_id, asked_at);

CREATE FUNCTION nests_guard() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.state IN ('failed', 'cancelled', 'cut') THEN
    RAISE EXCEPTION 'a cutting plan that is % does not change', OLD.state USING ERRCODE = 'check_violation';
  END IF;
  IF OLD.state IS DISTINCT FROM NEW.state AND (OLD.state || '>' || NEW.state) NOT IN (
    'waiting>searching', 'waiting>cancelled', 'waiting>failed', 'searching>done', 'searching>cancelled', 'searching>failed', 'done>cut'
  ) THEN
    RAISE EXCEPTION 'a cutting plan does not go from % to %', OLD.state, NEW.state USING ERRCODE = 'check_violation';
  END IF;
  IF (NEW.shop_id, NEW.id, NEW.job_id, NEW.title, NEW.source, NEW.source_sha256, NEW.asked_by, NEW.asked_at)
     IS DISTINCT FROM (OLD.shop_id, OLD.id, OLD.job_id, OLD.title, OLD.source, OLD.source_sha256, OLD.asked_by, OLD.asked_at)
     OR (OLD.result IS NOT NULL AND NEW.state <> 'cut' AND NEW.result IS DISTINCT FROM OLD.result) THEN
    RAISE EXCEPTION 'what a cutting plan was made from does not change' USING ERRCODE = 'check_violation';
  END IF;
  RETURN NEW;
END $$;
CREATE TRIGGER nests_guard BEFORE UPDATE ON nests FOR EACH ROW EXECUTE FUNCTION nests_guard();

CREATE TABLE offcuts (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  nps text NOT NULL CHECK (length(nps) BETWEEN 1 AND 12),
  schedule text NOT NULL CHECK (length(schedule) BETWEEN 1 AND 12),
  material text NOT NULL CHECK (length(material) BETWEEN 1 AND 120),
  length_mm double precision NOT NULL CHECK (length_mm > 0 AND length_mm <= 30000),
  heat text NOT NULL DEFAULT '' CHECK (length(heat) <= 60),
  came_from uuid,
  added_by uuid NOT NULL REFERENCES people (id),
  added_at timestamptz NOT NULL,
  gone_at timestamptz,
  gone_by uuid REFERENCES people (id),
  gone_to uuid,
  gone_why text NOT NULL DEFAULT '' CHECK (length(gone_why) <= 500),
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, came_from) REFERENCES nests (shop_id, id),
  FOREIGN KEY (shop_id, gone_to) REFERENCES nests (shop_id, id),
  CHECK ((gone_at IS NULL) = (gone_by IS NULL))
);
CREATE INDEX offcuts_rack ON offcuts (shop_id, nps) WHERE gone_at IS NULL;

GRANT SELECT, INSERT ON nests, offcuts TO quarterline_app;
GRANT UPDATE (state, progress, result, done_at, cut_by, cut_at) ON nests TO quarterline_app;
GRANT UPDATE (gone_at, gone_by, gone_to, gone_why) ON offcuts TO quarterline_app;
`;

const DOWN = `
DROP TABLE offcuts, nests;
DROP FUNCTION nests_guard();
`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(DOWN);
}
