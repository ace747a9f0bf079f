import { readFileSync } from 'node:fs';
import { join } from 'node:path';

export type DemoSignIn = { role: string; email: string; password: string; name: string };

/** The demo organisation's sign-ins, one per role. */
export function demoSignIns(root: string): DemoSignIn[] {
  return JSON.parse(readFileSync(join(root, 'templates/demo/signins.json'), 'utf8')) as DemoSignIn[];
}
