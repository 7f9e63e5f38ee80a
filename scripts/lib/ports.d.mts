export function isPortFree(port: number, host?: string): Promise<boolean>;
export function anyFreePort(): Promise<number>;
export function freePortFrom(wanted: number, host?: string): Promise<number>;
