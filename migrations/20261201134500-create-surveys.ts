/** Surveys: one per line, the document as stored text with a version, as lines have it. */
import type { QueryInterface } from "sequelize";

const UP = `
CREATE TABLE surveys (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  line_id uuid NOT NULL,
  document text NOT NULL CHECK (octet_length(document) <= 2000000),
  version integer NOT NULL CHECK (version >= 1),
  updated_at timestamptz NOT NULL,
  updated_by uuid NOT NULL REFERENCES people (id),
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, line_id) REFERENCES lines (shop_id, id),
  UNIQUE (shop_id, line_id)
);
GRANT SELECT, INSERT, UPDATE ON surveys TO quarterline_app;
`;

const DOWN = `DROP TABLE surveys;`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(DOWN);
}
