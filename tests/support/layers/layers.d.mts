export interface Layer {
  readonly name: string;
  readonly pure?: boolean;
  readonly may: readonly string[];
  readonly packages: readonly string[];
}

export const ROOT: string;
export function findLayer(file: string): Layer | undefined;
export function checkImport(file: string, specifier: string): string | undefined;
