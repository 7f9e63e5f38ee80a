/**
 * For the database tests: a throw-away PostgreSQL with both roles and every migration, and stand-ins for storage and
 * mail, all in a temporary folder. Tests read the addresses from the environment like the server does.
 * QUARTERLINE_TEST_SUPER_URL is the superuser's address, for tests that look beneath the application.
 */
import { startThrowAwayServices } from "../../scripts/lib/throw-away.mjs";

/** Starts the services and answers how to stop them. */
export async function setup(): Promise<() => Promise<void>> {
  const services = await startThrowAwayServices();
  Object.assign(process.env, services.environment, { QUARTERLINE_TEST_BASE_URL: services.environment.BASE_URL });
  return () => services.stop();
}
