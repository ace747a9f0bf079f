export const roles = ['administrator', 'supervisor', 'safetyOfficer', 'worker'] as const;
export type Role = (typeof roles)[number];

export const roleNames: Record<Role, string> = {
  administrator: 'Administrator',
  supervisor: 'Supervisor',
  safetyOfficer: 'Safety officer',
  worker: 'Worker',
};

const everyone: readonly Role[] = roles;
const office: readonly Role[] = ['administrator', 'supervisor', 'safetyOfficer'];

/**
 * The one authorisation table: which roles may do which act in their own organisation.
 * Every endpoint names one of these acts; nothing else decides.
 */
export const permissions = {
  'account.own': everyone,
  'organisation.read': office,
  'organisation.manage': ['administrator'],
  'user.manage': ['administrator'],
  'site.read': office,
  'site.manage': ['administrator', 'supervisor'],
  'person.read': office,
  'person.manage': ['administrator', 'supervisor'],
  'library.read': office,
  'statement.read': office,
  'statement.write': ['supervisor', 'safetyOfficer', 'administrator'],
  'statement.issue': ['safetyOfficer'],
  'revision.read': everyone,
  'signon.own': everyone,
  'signon.take': ['supervisor', 'safetyOfficer'],
  'register.read': office,
  'talk.read': office,
  'talk.write': ['supervisor', 'safetyOfficer'],
  'audit.read': ['safetyOfficer', 'administrator'],
} as const satisfies Record<string, readonly Role[]>;

export type Act = keyof typeof permissions;

/** Whether a role may do an act; the button asks it and the server enforces it. */
export function mayDo(role: Role, act: Act): boolean {
  return (permissions[act] as readonly Role[]).includes(role);
}
