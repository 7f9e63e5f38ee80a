export function migrate(ownerUrl: string, root: string): Promise<string[]>;
export function migrateDown(ownerUrl: string, root: string): Promise<string[]>;
export function pendingMigrations(ownerUrl: string, root: string): Promise<string[]>;
