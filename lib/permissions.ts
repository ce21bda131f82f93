/** The roles that a person can have in a program; one each. */
export const MEMBER_ROLES = ['chief', 'weights', 'simulation'] as const;
export type MemberRole = (typeof MEMBER_ROLES)[number];

export const ROLE_NAMES: Readonly<Record<MemberRole, string>> = {
  chief: 'Chief engineer',
  weights: 'Weights engineer',
  simulation: 'Simulation engineer',
};

/** Who someone is towards one program; towards the site `role` is null. */
export interface Standing {
  readonly admin: boolean;
  readonly role: MemberRole | null;
}

type Holder = 'admin' | MemberRole;
const EVERYBODY = 'everybody';

/** What concerns no program. `everybody` is anyone signed in. */
const SITE = {
  'account.keep': EVERYBODY,
  'tokens.keep': EVERYBODY,
  'programs.list': EVERYBODY,
  'roll-up.stateless': EVERYBODY,
  'people.keep': ['admin'],
  'programs.create': ['admin'],
} as const satisfies Record<string, typeof EVERYBODY | readonly Holder[]>;

/**
 * What concerns one program. An administrator keeps who belongs to it and reads nothing in it without being a member.
 * Simulation engineers see what has been signed, so here the program itself and its people.
 */
const PROGRAM = {
  'program.read': ['chief', 'weights', 'simulation'],
  'members.read': ['admin', 'chief', 'weights', 'simulation'],
  'members.keep': ['admin', 'chief'],
  'settings.read': ['chief', 'weights'],
  'frame.keep': ['chief'],
  'reference-points.keep': ['chief'],
  'builds.keep': ['chief'],
  'limits.keep': ['chief'],
  'allowances.keep': ['chief'],
  'groups.keep': ['chief', 'weights'],
  'lists.read': ['chief', 'weights'],
  'lists.keep': ['weights'],
  'rotors.read': ['chief', 'weights'],
  'rotors.keep': ['weights'],
  'configurations.read': ['chief', 'weights'],
  'configurations.keep': ['weights'],
  'baselines.read': ['chief', 'weights', 'simulation'],
  'submissions.read': ['chief', 'weights'],
  'baselines.submit': ['weights'],
  'baselines.decide': ['chief'],
  'baselines.withdraw': ['chief'],
  'trail.read': ['chief', 'weights'],
} as const satisfies Record<string, readonly Holder[]>;

export type SiteAction = keyof typeof SITE;
export type ProgramAction = keyof typeof PROGRAM;
export type Action = SiteAction | ProgramAction;

export const SITE_ACTIONS = Object.keys(SITE) as SiteAction[];
export const PROGRAM_ACTIONS = Object.keys(PROGRAM) as ProgramAction[];

const TABLE: Readonly<Record<Action, typeof EVERYBODY | readonly Holder[]>> = { ...SITE, ...PROGRAM };

/** Whether someone of this standing may do this. Pages, actions, internal routes and the API all ask here. */
export function may(action: Action, standing: Standing): boolean {
  const holders = TABLE[action];
  if (holders === EVERYBODY) return true;
  return (
    (standing.admin && holders.includes('admin')) ||
    (standing.role !== null && holders.includes(standing.role))
  );
}

/**
 * What a refusal tells: nothing of a program that is not theirs (`not-found`), and `forbidden` to its members.
 * Null when the action is allowed.
 */
export function refusal(action: Action, standing: Standing): 'not-found' | 'forbidden' | null {
  if (may(action, standing)) return null;
  return action in PROGRAM && standing.role === null ? 'not-found' : 'forbidden';
}
