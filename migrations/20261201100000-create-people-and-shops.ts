/** People, the shops they belong to, and how they get in: sessions, invitations, password resets, throttles. */
import type { QueryInterface } from "sequelize";

const UP = `
CREATE TABLE people (
  id uuid PRIMARY KEY,
  email text NOT NULL CHECK (email = lower(email) AND length(email) BETWEEN 3 AND 254),
  name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
  password_hash text NOT NULL,
  created_at timestamptz NOT NULL,
  UNIQUE (email)
);

CREATE TABLE shops (
  id uuid PRIMARY KEY,
  name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
  settings jsonb NOT NULL,
  created_at timestamptz NOT NULL
);

CREATE TABLE memberships (
  shop_id uuid NOT NULL REFERENCES shops (id),
  id uuid NOT NULL UNIQUE,
  person_id uuid NOT NULL REFERENCES people (id),
  role text NOT NULL CHECK (role IN ('owner', 'detailer', 'inspector', 'fitter')),
  joined_at timestamptz NOT NULL,
  removed_at timestamptz,
  PRIMARY KEY (shop_id, id)
);
CREATE UNIQUE INDEX memberships_one_live ON memberships (shop_id, person_id) WHERE removed_at IS NULL;
CREATE INDEX memberships_person ON memberships (person_id);

CREATE TABLE sessions (
  id uuid PRIMARY KEY,
  person_id uuid NOT NULL REFERENCES people (id),
  shop_id uuid NOT NULL REFERENCES shops (id),
  device text NOT NULL DEFAULT '' CHECK (length(device) <= 200),
  created_at timestamptz NOT NULL,
  last_seen_at timestamptz NOT NULL,
  expires_at timestamptz NOT NULL,
  ended_at timestamptz
);
CREATE INDEX sessions_person ON sessions (person_id);

CREATE TABLE invitations (
  shop_id uuid NOT NULL REFERENCES shops (id),
  id uuid NOT NULL UNIQUE,
  email text NOT NULL CHECK (email = lower(email)),
  role text NOT NULL CHECK (role IN ('owner', 'detailer', 'inspector', 'fitter')),
  token_hash text NOT NULL UNIQUE,
  invited_by uuid NOT NULL REFERENCES people (id),
  created_at timestamptz NOT NULL,
  expires_at timestamptz NOT NULL,
  accepted_at timestamptz,
  withdrawn_at timestamptz,
  PRIMARY KEY (shop_id, id),
  CHECK (accepted_at IS NULL OR withdrawn_at IS NULL)
);
CREATE UNIQUE INDEX invitations_one_open ON invitations (shop_id, email) WHERE accepted_at IS NULL AND withdrawn_at IS NULL;

CREATE TABLE password_resets (
  id uuid PRIMARY KEY,
  person_id uuid NOT NULL REFERENCES people (id),
  token_hash text NOT NULL UNIQUE,
  created_at timestamptz NOT NULL,
  expires_at timestamptz NOT NULL,
  used_at timestamptz
);
CREATE INDEX password_resets_person ON password_resets (person_id);

CREATE TABLE throttles (
  key text PRIMARY KEY CHECK (length(key) <= 300),
  tries integer NOT NULL CHECK (tries >= 0),
  window_started_at timestamptz NOT NULL
);

CREATE TABLE counters (
  shop_id uuid NOT NULL REFERENCES shops (id),
  name text NOT NULL,
  value bigint NOT NULL CHECK (value >= 0),
  PRIMARY KEY (shop_id, name)
);
`;

const DOWN = `DROP TABLE counters, throttles, password_resets, invitations, sessions, memberships, shops, people;`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(DOWN);
}
