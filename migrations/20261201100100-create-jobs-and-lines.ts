/** Jobs, lines with their run documents, spools, uploads, and the shop's word on catalogue take-outs. */
import type { QueryInterface } from "sequelize";

const UP = `
CREATE TABLE jobs (
  shop_id uuid NOT NULL REFERENCES shops (id),
  id uuid NOT NULL UNIQUE,
  number text NOT NULL CHECK (length(number) BETWEEN 1 AND 60),
  title text NOT NULL CHECK (length(title) <= 120),
  client text NOT NULL CHECK (length(client) <= 120),
  area text NOT NULL CHECK (length(area) <= 120),
  open boolean NOT NULL DEFAULT true,
  settings jsonb NOT NULL,
  created_at timestamptz NOT NULL,
  created_by uuid NOT NULL REFERENCES people (id),
  updated_at timestamptz NOT NULL,
  PRIMARY KEY (shop_id, id)
);
CREATE UNIQUE INDEX jobs_number ON jobs (shop_id, lower(number));

-- The document and the marks are text, not jsonb: what was saved is what comes back, digit for digit.
CREATE TABLE lines (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  job_id uuid NOT NULL,
  number text NOT NULL CHECK (length(number) BETWEEN 1 AND 60),
  title text NOT NULL CHECK (length(title) <= 120),
  size text NOT NULL CHECK (length(size) <= 40),
  material text NOT NULL CHECK (length(material) <= 120),
  points integer NOT NULL CHECK (points >= 0),
  document text NOT NULL CHECK (octet_length(document) <= 8000000),
  marks text NOT NULL CHECK (octet_length(marks) <= 8000000),
  version integer NOT NULL CHECK (version >= 1),
  created_at timestamptz NOT NULL,
  created_by uuid NOT NULL REFERENCES people (id),
  updated_at timestamptz NOT NULL,
  updated_by uuid NOT NULL REFERENCES people (id),
  archived_at timestamptz,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, job_id) REFERENCES jobs (shop_id, id)
);
CREATE UNIQUE INDEX lines_number ON lines (shop_id, job_id, lower(number)) WHERE archived_at IS NULL;

-- Who touched a line's content and when: nobody signs what they touched themselves.
CREATE TABLE line_touches (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  line_id uuid NOT NULL,
  person_id uuid NOT NULL REFERENCES people (id),
  version integer NOT NULL,
  at timestamptz NOT NULL,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, line_id) REFERENCES lines (shop_id, id)
);
CREATE INDEX line_touches_line ON line_touches (shop_id, line_id, at);

CREATE TABLE spools (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  line_id uuid NOT NULL,
  letter text NOT NULL CHECK (length(letter) BETWEEN 1 AND 10),
  sheet_number integer CHECK (sheet_number > 0),
  status text NOT NULL DEFAULT 'live' CHECK (status IN ('live', 'void')),
  created_at timestamptz NOT NULL,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, line_id) REFERENCES lines (shop_id, id),
  UNIQUE (shop_id, line_id, letter),
  UNIQUE (shop_id, sheet_number)
);

CREATE TABLE uploads (
  shop_id uuid NOT NULL REFERENCES shops (id),
  id uuid NOT NULL UNIQUE,
  line_id uuid,
  kind text NOT NULL CHECK (kind IN ('sketch', 'logo')),
  name text NOT NULL CHECK (length(name) BETWEEN 1 AND 200),
  type text NOT NULL,
  bytes integer NOT NULL CHECK (bytes > 0),
  sha256 text NOT NULL CHECK (length(sha256) = 64),
  object_key text NOT NULL,
  at timestamptz NOT NULL,
  by uuid NOT NULL REFERENCES people (id),
  removed_at timestamptz,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, line_id) REFERENCES lines (shop_id, id),
  CHECK ((kind = 'sketch') = (line_id IS NOT NULL))
);
CREATE INDEX uploads_line ON uploads (shop_id, line_id);
CREATE INDEX uploads_object ON uploads (shop_id, object_key);

-- Insert-only: the newest word on a key counts, the older ones stay to be read.
CREATE TABLE take_out_words (
  shop_id uuid NOT NULL REFERENCES shops (id),
  id uuid NOT NULL UNIQUE,
  key text NOT NULL CHECK (length(key) BETWEEN 1 AND 120),
  value_mm double precision CHECK (value_mm > 0 AND value_mm <= 1000000),
  by uuid NOT NULL REFERENCES people (id),
  at timestamptz NOT NULL,
  seq bigint GENERATED ALWAYS AS IDENTITY,
  PRIMARY KEY (shop_id, id)
);
CREATE INDEX take_out_words_key ON take_out_words (shop_id, key, seq);
`;

const DOWN = `DROP TABLE take_out_words, uploads, spools, line_touches, lines, jobs;`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(DOWN);
}
