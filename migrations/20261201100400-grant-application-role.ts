/**
 * What the application's role may do. It owns nothing and changes no structure; signed content, log entries, work and
 * touches are insert-only for it, and of a revision it may change the state and what goes with it, no more.
 */
import type { QueryInterface } from "sequelize";

const CHANGEABLE = ["people", "shops", "memberships", "sessions", "invitations", "password_resets", "throttles", "counters", "jobs", "lines", "spools", "uploads"];
const INSERT_ONLY = [
  "line_touches",
  "take_out_words",
  "revision_inputs",
  "revision_sheets",
  "sheet_copies",
  "sign_offs",
  "work_entries",
  "audit_events",
];
/** The only rows the application may remove: throttle windows that are over, and letters of drafts never submitted. */
const REMOVABLE = ["throttles", "spools"];

const REVISION_COLUMNS = "state, hold, hold_reason, signed_by, signed_at, return_reason, void_reason, state_at, state_by";

const UP = `
DO $$ BEGIN
  IF NOT EXISTS (SELECT 1 FROM pg_roles WHERE rolname = 'quarterline_app') THEN
    RAISE EXCEPTION 'The role quarterline_app does not exist. Make the roles before migrating.';
  END IF;
END $$;
REVOKE CREATE ON SCHEMA public FROM PUBLIC;
GRANT USAGE ON SCHEMA public TO quarterline_app;
${CHANGEABLE.map((table) => `GRANT SELECT, INSERT, UPDATE ON ${table} TO quarterline_app;`).join("\n")}
${REMOVABLE.map((table) => `GRANT DELETE ON ${table} TO quarterline_app;`).join("\n")}
${INSERT_ONLY.map((table) => `GRANT SELECT, INSERT ON ${table} TO quarterline_app;`).join("\n")}
GRANT SELECT, INSERT ON revisions TO quarterline_app;
GRANT UPDATE (${REVISION_COLUMNS}) ON revisions TO quarterline_app;
`;

const DOWN = `
${[...CHANGEABLE, ...INSERT_ONLY, "revisions"].map((table) => `REVOKE ALL ON ${table} FROM quarterline_app;`).join("\n")}
REVOKE USAGE ON SCHEMA public FROM quarterline_app;
`;

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(DOWN);
}
