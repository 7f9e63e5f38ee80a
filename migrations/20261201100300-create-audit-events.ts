/**
 * The shop's log: one chain of hash-linked events per shop. Rows are only ever added: the application's role
 * has no grant to change or remove one.
 */
import type { QueryInterface } from "sequelize";

const UP = `
CREATE TABLE audit_events (
  shop_id uuid NOT NULL REFERENCES shops (id),
  seq bigint NOT NULL CHECK (seq >= 1),
  type text NOT NULL CHECK (length(type) BETWEEN 1 AND 60),
  data text NOT NULL,
  actor uuid REFERENCES people (id),
  at timestamptz(3) NOT NULL,
  prev_hash text NOT NULL,
  hash text NOT NULL CHECK (length(hash) = 64),
  PRIMARY KEY (shop_id, seq)
);
CREATE INDEX audit_events_type ON audit_events (shop_id, type);
`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query("DROP TABLE audit_events;");
}
