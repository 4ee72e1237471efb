/** Types of fakes.mjs for the tests. */
export interface Fakes {
  /** What lib/config.ts asks for, APP_URL and NODE_ENV aside. */
  readonly env: Readonly<Record<string, string>>;
  readonly logDir: string;
  stop(): Promise<void>;
}

export function startFakes(dataDir: string, options?: { readonly throwaway?: boolean }): Promise<Fakes>;
