/** The import rule as a function; the ESLint rule and tests/unit/import-rule.test.ts share it and its table. */
import { readFileSync } from 'node:fs';
import path from 'node:path';

export const ROOT = path.resolve(import.meta.dirname, '../../..');
const { layers } = JSON.parse(readFileSync(path.join(import.meta.dirname, 'layers.json'), 'utf8'));
const KEYS = Object.keys(layers).sort((a, b) => b.length - a.length);

/** The layer of a file (path from the root, slashes), or undefined for a file outside the rule. */
export function findLayer(file) {
  const name = KEYS.find((key) => file.startsWith(key));
  return name === undefined ? undefined : { name, ...layers[name] };
}

function packageAllowed(specifier, packages) {
  return packages.some((name) => (name.endsWith(':') ? specifier.startsWith(name) : specifier === name || specifier.startsWith(`${name}/`)));
}

/** Path from the root that a specifier of ours names, or undefined for a package. */
function targetOf(file, specifier) {
  if (specifier.startsWith('@/')) return specifier.slice(2);
  if (specifier.startsWith('.')) return path.posix.join(path.posix.dirname(file), specifier);
  return undefined;
}

/** What is wrong with `file` importing `specifier`, or undefined when it may. */
export function checkImport(file, specifier) {
  const layer = findLayer(file);
  if (!layer) return undefined;
  const target = targetOf(file, specifier);
  if (target === undefined) {
    return packageAllowed(specifier, layer.packages) ? undefined : `${layer.name} may not use the package ${specifier}`;
  }
  const own = findLayer(target) ?? findLayer(`${target}/`) ?? findLayer(`${target}.ts`);
  if (own?.name === layer.name) return undefined;
  return layer.may.some((prefix) => target.startsWith(prefix)) ? undefined : `${layer.name} may not import ${target}`;
}
