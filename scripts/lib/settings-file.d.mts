/** What the application's processes are told by the stack in the data folder (QUARTERLINE_DATA_DIR, else .data). */
export function localEnvironment(): Record<string, string | undefined>;
