import { may, type ProgramAction, type Standing } from '@/lib/permissions';

/** What a token can be made for. */
export const TOKEN_SCOPES = ['baselines:read', 'lists:write'] as const;
export type TokenScope = (typeof TOKEN_SCOPES)[number];

export const SCOPE_NAMES: Readonly<Record<TokenScope, string>> = {
  'baselines:read': 'Read programs and signed baselines',
  'lists:write': 'Create mass lists and upload revisions',
};

/** The action that a scope stands for: its holder must still be allowed it, in the program concerned, at every call. */
const SCOPE_ACTION: Readonly<Record<TokenScope, ProgramAction>> = {
  'baselines:read': 'program.read',
  'lists:write': 'lists.keep',
};

export function isTokenScope(text: string): text is TokenScope {
  return (TOKEN_SCOPES as readonly string[]).includes(text);
}

/** Whether this standing towards a program carries the scope there. */
export function carriesScope(scope: TokenScope, standing: Standing): boolean {
  return may(SCOPE_ACTION[scope], standing);
}

/** The scopes that someone with these roles can ask for; reading what one may see is open to all. */
export function scopesWithin(programs: readonly { readonly role: Standing['role'] }[]): TokenScope[] {
  return TOKEN_SCOPES.filter(
    (scope) =>
      scope === 'baselines:read' || programs.some(({ role }) => carriesScope(scope, { admin: false, role })),
  );
}
