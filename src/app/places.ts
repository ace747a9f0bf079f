import {
  AlertTriangle,
  Clock,
  FileText,
  ListChecks,
  type LucideIcon,
  MapPin,
  Megaphone,
  PenLine,
  Sun,
  UserRound,
  Users,
} from 'lucide-react';
import { type Act, mayDo, type Role } from '#shared/kernel/roles.ts';
import { paths } from './paths.ts';

type Place = { to: string; name: string; icon: LucideIcon; act: Act };

const firstPlaces: Record<Role, Place> = {
  supervisor: { to: paths.today, name: 'Today', icon: Sun, act: 'site.read' },
  safetyOfficer: { to: paths.exceptions, name: 'Exceptions', icon: AlertTriangle, act: 'audit.read' },
  worker: { to: paths.toSign, name: 'To sign', icon: PenLine, act: 'signon.own' },
  administrator: { to: paths.lapsing, name: 'Lapsing', icon: Clock, act: 'organisation.manage' },
};

const places: Place[] = [
  { to: paths.statements, name: 'Statements', icon: FileText, act: 'statement.read' },
  { to: paths.register, name: 'Register', icon: ListChecks, act: 'register.read' },
  { to: paths.talks, name: 'Talks', icon: Megaphone, act: 'talk.read' },
  { to: paths.sites, name: 'Sites', icon: MapPin, act: 'site.read' },
  { to: paths.people, name: 'People', icon: Users, act: 'person.read' },
  { to: paths.members, name: 'Sign-ins', icon: UserRound, act: 'user.manage' },
];

export function placesOf(role: Role): Place[] {
  return [firstPlaces[role], ...places.filter(({ act }) => mayDo(role, act))];
}

export const firstPathOf = (role: Role): string => firstPlaces[role].to;
