import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { ROOT } from '../support/layers/layers.mjs';

const BINARY = /\.(png|jpe?g|woff2?|otf|ttf|mxl|pdf|ico|gz)$/;
const SELF = 'tests/unit/repository.test.ts';

const NOT_OURS = /^(node_modules|\.git|\.next|\.data|coverage|test-results|playwright-report)\//;

/** The tracked files; in an unpacked archive, which tracks nothing, all of them. */
function ourFiles(): readonly string[] {
  const listed = existsSync(path.join(ROOT, '.git'))
    ? execFileSync('git', ['ls-files', '-z'], { cwd: ROOT, encoding: 'utf8' }).split('\0')
    : readdirSync(ROOT, { recursive: true, withFileTypes: true })
        .filter((entry) => entry.isFile())
        .map((entry) => path.relative(ROOT, path.join(entry.parentPath, entry.name)));
  return listed.filter((file) => file !== '' && file !== SELF && !NOT_OURS.test(file) && !BINARY.test(file));
}

/** Files that say `pattern`; a file that is removed but not yet committed so is passed over. */
function filesSaying(pattern: RegExp): readonly string[] {
  return ourFiles().filter((file) => {
    try {
      return pattern.test(readFileSync(path.join(ROOT, file), 'utf8'));
    } catch (error) {
      if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return false;
      throw error;
    }
  });
}

describe('the repository', () => {
  it('names no place on one machine', () => {
    expect(filesSaying(/(^|[\s"'`(=])\/(work|root|home)\/[a-z]|\/tmp\/team/m)).toEqual([]);
  });

  it('names no host of a package registry', () => {
    expect(filesSaying(/\bregistry\.[a-z-]+\.[a-z]{2,}|"resolved": "http/)).toEqual([]);
  });
});
