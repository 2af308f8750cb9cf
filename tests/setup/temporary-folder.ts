import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';

declare module 'vitest' {
  export interface ProvidedContext {
    temporaryFolder: string;
  }
}

/** One folder for everything that a run writes; gone when the run ends. */
export default function setup(project: TestProject) {
  const folder = mkdtempSync(join(tmpdir(), 'foldwright-test-'));
  project.provide('temporaryFolder', folder);
  return () => rmSync(folder, { recursive: true, force: true });
}
