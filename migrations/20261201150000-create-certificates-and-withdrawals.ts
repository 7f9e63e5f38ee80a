/**
 * Certificates that shops sign sheets with (each row stays; the newest is in use), which one signed a sheet, and which
 * printed or downloaded copies were taken out of use again. A download of the stored bytes is a copy marked ORIGINAL.
 */
import type { QueryInterface } from "sequelize";

const UP = `
CREATE TABLE shop_certificates (
  shop_id uuid NOT NULL REFERENCES shops (id),
  id uuid NOT NULL UNIQUE,
  ordinal integer NOT NULL CHECK (ordinal >= 1),
  origin text NOT NULL CHECK (origin IN ('made', 'uploaded')),
  subject text NOT NULL CHECK (length(subject) BETWEEN 1 AND 400),
  issuer text NOT NULL CHECK (length(issuer) BETWEEN 1 AND 400),
  fingerprint text NOT NULL CHECK (length(fingerprint) = 64),
  valid_from timestamptz NOT NULL,
  valid_to timestamptz NOT NULL,
  certificate_pem text NOT NULL,
  -- Encrypted under the server's key, never in clear.
  sealed_p12 text NOT NULL CHECK (sealed_p12 LIKE 'v1.%'),
  sealed_password text NOT NULL CHECK (sealed_password LIKE 'v1.%'),
  at timestamptz NOT NULL,
  by uuid NOT NULL REFERENCES people (id),
  PRIMARY KEY (shop_id, id),
  UNIQUE (shop_id, ordinal),
  CHECK (valid_from < valid_to)
);

-- NULL: stored before sheets were signed with a certificate, or one for review.
ALTER TABLE revision_sheets ADD COLUMN certificate_id uuid;
ALTER TABLE revision_sheets ADD FOREIGN KEY (shop_id, certificate_id) REFERENCES shop_certificates (shop_id, id);

CREATE TABLE copy_withdrawals (
  shop_id uuid NOT NULL,
  id uuid NOT NULL UNIQUE,
  copy_id uuid NOT NULL,
  at timestamptz NOT NULL,
  by uuid NOT NULL REFERENCES people (id),
  PRIMARY KEY (shop_id, id),
  FOREIGN KEY (shop_id, copy_id) REFERENCES sheet_copies (shop_id, id),
  UNIQUE (shop_id, copy_id)
);
CREATE INDEX sheet_copies_sheet ON sheet_copies (shop_id, sheet_id);

GRANT SELECT, INSERT ON shop_certificates, copy_withdrawals TO quarterline_app;
`;

const DOWN = `
DROP INDEX sheet_copies_sheet;
DROP TABLE copy_withdrawals;
ALTER TABLE revision_sheets DROP COLUMN certificate_id;
DROP TABLE shop_certificates;
`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(DOWN);
}
