import { expect, test } from 'vitest';
import { type Act, mayDo, permissions, type Role, roles } from '#shared/kernel/roles.ts';

const mayOf = (role: Role) => (Object.keys(permissions) as Act[]).filter((act) => mayDo(role, act)).sort();

test('a worker may read what was issued and sign, and nothing else', () => {
  expect(mayOf('worker')).toEqual(['account.own', 'revision.read', 'signon.own']);
});

test('only a safety officer issues: the second pair of eyes', () => {
  expect(roles.filter((role) => mayDo(role, 'statement.issue'))).toEqual(['safetyOfficer']);
});

test('an administrator neither issues, nor takes sign-ons, nor holds talks', () => {
  for (const act of ['statement.issue', 'signon.take', 'talk.write'] as const)
    expect(mayDo('administrator', act)).toBe(false);
});

test('only an administrator gives sign-ins', () => {
  expect(roles.filter((role) => mayDo(role, 'user.manage'))).toEqual(['administrator']);
});

test('every act is somebody’s', () => {
  for (const [act, whose] of Object.entries(permissions))
    expect([act, whose.length > 0]).toEqual([act, true]);
});
