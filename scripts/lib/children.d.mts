export interface RunningChild {
  readonly name: string;
  readonly pid: number;
  readonly record: { pid: number; started: string | null };
  readonly exited: Promise<{ code: number | null; signal: string | null }>;
  stop(patienceMs?: number): Promise<void>;
}

export interface NodeScript {
  readonly name: string;
  readonly script: string;
  readonly args?: readonly string[];
  readonly env: Readonly<Record<string, string | undefined>>;
  readonly cwd: string;
  readonly logFile: string;
  readonly waitForMessage?: boolean;
  readonly limitMs?: number;
}
export function startNode(script: NodeScript): Promise<RunningChild>;
