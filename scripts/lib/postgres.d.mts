export interface RunningPostgres {
  readonly port: number;
  readonly pid: number;
  readonly record: { pid: number; started: string | null };
  readonly exited: Promise<{ code: number | null; signal: string | null }>;
  /** Fast stop; everything is written out. */
  stop(): Promise<void>;
  /** kill -9 of the server. */
  crash(): Promise<void>;
}
export const SUPERUSER: string;
export function postgresPrograms(): string | null;
export function serverUser(): { uid: number; gid: number } | null;
export function canServerUse(folder: string): boolean;
export function makeServerFolder(folder: string): void;
export function initCluster(home: string, superPassword: string): boolean;
export function clearLeftovers(cluster: string): Promise<void>;
export function startPostgres(options: { home: string; port: number; logFile: string; extra?: string[] }): Promise<RunningPostgres>;
