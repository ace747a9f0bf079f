import { fileURLToPath } from 'node:url';
import { demoSignIns } from './demo-sign-ins.ts';

const root = fileURLToPath(new URL('../..', import.meta.url));
console.log(
  JSON.stringify(demoSignIns(root).map(({ role, email, password }) => ({ role, email, password }))),
);
