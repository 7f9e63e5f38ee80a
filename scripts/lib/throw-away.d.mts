export interface ThrowAwayPostgres {
  readonly folder: string;
  readonly port: number;
  /** Address for each role: the one that migrates, the application's, the superuser. */
  readonly ownerUrl: string;
  readonly appUrl: string;
  readonly superUrl: string;
  readonly passwords: { readonly superPassword: string; readonly ownerPassword: string; readonly appPassword: string };
  crash(): Promise<void>;
  restart(): Promise<void>;
  stop(): Promise<void>;
}
export interface ThrowAwayServices {
  readonly postgres: ThrowAwayPostgres;
  readonly folder: string;
  readonly environment: Readonly<Record<string, string>>;
  stop(): Promise<void>;
}
export function throwAwayFolder(): string;
export function startThrowAwayPostgres(options?: { migrated?: boolean }): Promise<ThrowAwayPostgres>;
export function startThrowAwayServices(): Promise<ThrowAwayServices>;
