import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, readdirSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { expect, it } from 'vitest';
import { DEMO_PIECES, engravePiece } from '@/db/seed/music';

it('analyse writes a report for every score of a folder, more scores than cores, and says what it refused', () => {
  const folder = mkdtempSync(path.join(os.tmpdir(), 'understave-analyse-'));
  const out = path.join(folder, 'out');
  for (const [name, piece] of Object.entries(DEMO_PIECES)) writeFileSync(path.join(folder, `${name}.musicxml`), engravePiece(piece));
  writeFileSync(path.join(folder, 'broken.xml'), '<score-partwise><part-list>');
  const run = () => execFileSync('npm', ['run', '--silent', 'analyse', '--', folder, '--out', out], { stdio: 'pipe', timeout: 120_000 });
  expect(run).toThrow(expect.objectContaining({ status: 1 }));
  expect(readdirSync(out).sort()).toEqual([...Object.keys(DEMO_PIECES), 'broken'].map((name) => `${name}.json`).sort());
  const report = (name: string) => JSON.parse(readFileSync(path.join(out, `${name}.json`), 'utf8')) as { labels?: unknown[]; error?: { code: string } };
  expect(report('broken').error?.code).toBe('xml_broken');
  expect(report('eveningHymn').labels?.length).toBeGreaterThan(30);
}, 150_000);
