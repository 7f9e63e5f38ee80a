export function sourcesHash(): string;
export function isBuildCurrent(): boolean;
export function ensureBuild(): Promise<void>;
export function leaveBuild(): void;
