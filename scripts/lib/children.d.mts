export interface RunningChild {
  readonly name: string;
  readonly pid: number;
  readonly record: { pid: number; started: string | null };
  readonly exited: Promise<{ code: number | null; signal: string | null }>;
  stop(patienceMs?: number): Promise<void>;
}
