/** Measurements of finished spools against a revision of their sheet: the points as typed, and what they came to. Insert-only. */
import type { QueryInterface } from "sequelize";

const UP = `
CREATE TABLE spool_measurements (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  spool_id uuid NOT NULL,
  revision_id uuid NOT NULL,
  document text NOT NULL CHECK (octet_length(document) <= 200000),
  verdict text NOT NULL CHECK (verdict IN ('go', 'near', 'trim', 'stop', 'none')),
  headline text NOT NULL CHECK (length(headline) BETWEEN 1 AND 4000),
  by uuid NOT NULL REFERENCES people (id),
  at timestamptz NOT NULL,
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, spool_id) REFERENCES spools (shop_id, id),
  FOREIGN KEY (shop_id, revision_id) REFERENCES revisions (shop_id, id)
);
CREATE INDEX spool_measurements_spool ON spool_measurements (shop_id, spool_id, at);
GRANT SELECT, INSERT ON spool_measurements TO quarterline_app;
`;

const DOWN = `DROP TABLE spool_measurements;`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(DOWN);
}
