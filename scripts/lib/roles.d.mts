export const OWNER_ROLE: string;
export const APP_ROLE: string;
export function databaseUrl(role: string, password: string, port: number, database: string): string;
export function ensureDatabase(
  superUrl: string,
  wanted: { database: string; ownerPassword: string; appPassword: string },
): Promise<void>;
