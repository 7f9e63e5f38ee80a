export interface BackupManifest {
  readonly format: number;
  readonly madeAt: string;
  readonly baseUrl: string;
  readonly roles: readonly string[];
  readonly database: { readonly file: string; readonly sha256: string; readonly bytes: number };
  readonly objects: readonly { readonly key: string; readonly sha256: string; readonly bytes: number; readonly contentType: string }[];
}
type Environment = Readonly<Record<string, string | undefined>>;
export function writeBackup(environment: Environment, folder: string, now: Date): Promise<BackupManifest>;
export function checkBackup(folder: string): Promise<BackupManifest>;
export function restoreBackup(environment: Environment, folder: string, options: { force: boolean }): Promise<BackupManifest>;
