/**
 * Every page, route handler and server action, and what it asks before it does anything. Written by hand: whoever adds one says
 * here who is meant to reach it. `public` needs no sign-in; `site` and `program` are followed by an action of lib/permissions.ts;
 * `token` is a bearer token, with the action that the program's role must allow where one is concerned.
 */
export const ACCESS: Readonly<Record<string, Readonly<Record<string, string>>>> = {
  'app/(auth)/sign-in/page.tsx': { page: 'public' },
  'app/(auth)/sign-in/actions.ts': { signInAction: 'public' },
  'app/(auth)/invitation/[secret]/page.tsx': { page: 'public' },
  'app/(auth)/invitation/[secret]/actions.ts': { acceptInvitationAction: 'public' },
  'app/(auth)/password-reset/page.tsx': { page: 'public' },
  'app/(auth)/password-reset/actions.ts': { requestPasswordResetAction: 'public' },
  'app/(auth)/password-reset/[secret]/page.tsx': { page: 'public' },
  'app/(auth)/password-reset/[secret]/actions.ts': { resetPasswordAction: 'public' },

  'app/(workspace)/page.tsx': { page: 'site programs.list' },
  'app/(workspace)/actions.ts': { signOutAction: 'site account.keep' },
  'app/(workspace)/account/page.tsx': { page: 'site account.keep' },
  'app/(workspace)/account/actions.ts': {
    changePasswordAction: 'site account.keep',
    signOutEverywhereAction: 'site account.keep',
    setMailWishAction: 'site account.keep',
    makeTokenAction: 'site tokens.keep',
    revokeTokenAction: 'site tokens.keep',
  },
  'app/(workspace)/admin/page.tsx': { page: 'site people.keep' },
  'app/(workspace)/admin/actions.ts': {
    invitePersonAction: 'site people.keep',
    resendInvitationAction: 'site people.keep',
    disablePersonAction: 'site people.keep',
    enablePersonAction: 'site people.keep',
    createProgramAction: 'site programs.create',
  },
  'app/(workspace)/admin/programs/[program]/page.tsx': { page: 'site people.keep, program members.keep' },

  'app/(workspace)/programs/[program]/page.tsx': { page: 'program program.read' },
  'app/(workspace)/programs/[program]/baselines/page.tsx': { page: 'program baselines.read' },
  'app/(workspace)/programs/[program]/baselines/[baseline]/page.tsx': { page: 'program baselines.read' },
  'app/(workspace)/programs/[program]/baselines/[baseline]/views/page.tsx': { page: 'program lists.read' },
  'app/(workspace)/programs/[program]/baselines/account/page.tsx': { page: 'program baselines.read' },
  'app/(workspace)/programs/[program]/baselines/rows/page.tsx': { page: 'program lists.read' },
  'app/(workspace)/programs/[program]/baselines/submissions/[submission]/page.tsx': {
    page: 'program submissions.read',
  },
  'app/(workspace)/programs/[program]/baselines/submit/page.tsx': { page: 'program baselines.submit' },
  'app/(workspace)/programs/[program]/baselines/actions.ts': {
    submitConfigurationAction: 'program baselines.submit',
    signSubmissionAction: 'program baselines.decide',
    returnSubmissionAction: 'program baselines.decide',
    withdrawBaselineAction: 'program baselines.withdraw',
  },
  'app/(workspace)/programs/[program]/hand-off/page.tsx': { page: 'program baselines.read' },
  'app/api/internal/programs/[program]/baselines/[number]/document/route.ts': {
    GET: 'program baselines.read',
  },
  'app/api/internal/programs/[program]/baselines/[number]/conditions/route.ts': {
    GET: 'program baselines.read',
  },
  'app/(workspace)/programs/[program]/trail/page.tsx': { page: 'program trail.read' },

  'app/(workspace)/programs/[program]/settings/members/page.tsx': { page: 'program members.read' },
  'app/(workspace)/programs/[program]/settings/members/actions.ts': {
    addMemberAction: 'program members.keep',
    changeMemberRoleAction: 'program members.keep',
    removeMemberAction: 'program members.keep',
  },

  'app/(workspace)/programs/[program]/settings/page.tsx': { page: 'program settings.read' },
  'app/(workspace)/programs/[program]/settings/frame-issue/page.tsx': { page: 'program frame.keep' },
  'app/(workspace)/programs/[program]/settings/reference-points/page.tsx': { page: 'program settings.read' },
  'app/(workspace)/programs/[program]/settings/builds/page.tsx': { page: 'program settings.read' },
  'app/(workspace)/programs/[program]/settings/limits/page.tsx': { page: 'program settings.read' },
  'app/(workspace)/programs/[program]/settings/groups/page.tsx': { page: 'program settings.read' },
  'app/(workspace)/programs/[program]/settings/groups/actions.ts': {
    addGroupAction: 'program groups.keep',
    takeGroupsAction: 'program groups.keep',
    moveGroupAction: 'program groups.keep',
    recodeGroupAction: 'program groups.keep',
    removeGroupAction: 'program groups.keep',
  },
  'app/(workspace)/programs/[program]/settings/actions.ts': {
    issueFrameAction: 'program frame.keep',
    stateFormerFrameAction: 'program frame.keep',
    addReferencePointAction: 'program reference-points.keep',
    addBuildAction: 'program builds.keep',
    setLimitAction: 'program limits.keep',
    removeLimitAction: 'program limits.keep',
    setAllowanceAction: 'program allowances.keep',
    removeAllowanceAction: 'program allowances.keep',
  },
  'app/(workspace)/programs/[program]/rotating-parts/page.tsx': { page: 'program rotors.read' },
  'app/(workspace)/programs/[program]/rotating-parts/rotor/page.tsx': { page: 'program rotors.keep' },
  'app/(workspace)/programs/[program]/rotating-parts/upload/page.tsx': { page: 'program rotors.keep' },
  'app/(workspace)/programs/[program]/rotating-parts/actions.ts': {
    savePointsAction: 'program rotors.keep',
    saveRotorAction: 'program rotors.keep',
    removeRotorAction: 'program rotors.keep',
  },
  'app/api/internal/programs/[program]/rotors/revisions/route.ts': { POST: 'program rotors.keep' },
  'app/(workspace)/programs/[program]/configurations/page.tsx': { page: 'program configurations.read' },
  'app/(workspace)/programs/[program]/configurations/[configuration]/page.tsx': {
    page: 'program configurations.read',
  },
  'app/(workspace)/programs/[program]/configurations/[configuration]/inputs/page.tsx': {
    page: 'program configurations.keep',
  },
  'app/(workspace)/programs/[program]/configurations/[configuration]/conditions/page.tsx': {
    page: 'program configurations.keep',
  },
  'app/(workspace)/programs/[program]/configurations/[configuration]/views/page.tsx': {
    page: 'program configurations.read',
  },
  'app/(workspace)/programs/[program]/configurations/actions.ts': {
    createConfigurationAction: 'program configurations.keep',
    rollUpAction: 'program configurations.keep',
    takeRevisionAction: 'program configurations.keep',
    pinRevisionsAction: 'program configurations.keep',
    chooseFrameAction: 'program configurations.keep',
    saveConditionAction: 'program configurations.keep',
    removeConditionAction: 'program configurations.keep',
  },

  'app/(workspace)/programs/[program]/lists/page.tsx': { page: 'program lists.read' },
  'app/(workspace)/programs/[program]/lists/actions.ts': {
    addListAction: 'program lists.keep',
    declareListAction: 'program lists.keep',
    carryListAction: 'program lists.keep',
    restoreRevisionAction: 'program lists.keep',
  },
  'app/(workspace)/programs/[program]/lists/new/page.tsx': { page: 'program lists.keep' },
  'app/(workspace)/programs/[program]/lists/[list]/page.tsx': { page: 'program lists.read' },
  'app/(workspace)/programs/[program]/lists/[list]/changes/page.tsx': { page: 'program lists.read' },
  'app/(workspace)/programs/[program]/lists/[list]/declarations/page.tsx': { page: 'program lists.keep' },
  'app/(workspace)/programs/[program]/lists/[list]/edit/page.tsx': { page: 'program lists.keep' },
  'app/(workspace)/programs/[program]/lists/[list]/imports/[import]/page.tsx': { page: 'program lists.read' },
  'app/(workspace)/programs/[program]/lists/[list]/revisions/page.tsx': { page: 'program lists.read' },
  'app/(workspace)/programs/[program]/lists/[list]/upload/page.tsx': { page: 'program lists.keep' },

  'app/api/internal/programs/[program]/lists/example/route.ts': { GET: 'program lists.read' },
  'app/api/internal/programs/[program]/lists/[list]/draft/route.ts': {
    GET: 'program lists.keep',
    PATCH: 'program lists.keep',
    DELETE: 'program lists.keep',
  },
  'app/api/internal/programs/[program]/lists/[list]/draft/move/route.ts': { POST: 'program lists.keep' },
  'app/api/internal/programs/[program]/lists/[list]/draft/save/route.ts': { POST: 'program lists.keep' },
  'app/api/internal/programs/[program]/lists/[list]/drafts/route.ts': { GET: 'program lists.read' },
  'app/api/internal/programs/[program]/lists/[list]/imports/[import]/route.ts': {
    GET: 'program lists.read',
    DELETE: 'program lists.keep',
  },
  'app/api/internal/programs/[program]/lists/[list]/imports/[import]/problems/route.ts': {
    GET: 'program lists.read',
  },
  'app/(workspace)/programs/[program]/lists/[list]/uploads/[upload]/page.tsx': {
    page: 'program lists.keep',
  },
  'app/api/internal/programs/[program]/lists/[list]/uploads/[upload]/route.ts': {
    DELETE: 'program lists.keep',
  },
  'app/api/internal/programs/[program]/lists/[list]/uploads/[upload]/sample/route.ts': {
    GET: 'program lists.keep',
  },
  'app/api/internal/programs/[program]/lists/[list]/uploads/[upload]/check/route.ts': {
    POST: 'program lists.keep',
  },
  'app/api/internal/programs/[program]/lists/[list]/uploads/[upload]/import/route.ts': {
    POST: 'program lists.keep',
  },
  'app/api/internal/programs/[program]/lists/[list]/revisions/route.ts': { POST: 'program lists.keep' },
  'app/api/internal/programs/[program]/lists/[list]/revisions/[revision]/changes/route.ts': {
    GET: 'program lists.read',
  },
  'app/api/internal/programs/[program]/lists/[list]/revisions/[revision]/export/route.ts': {
    GET: 'program lists.read',
  },
  'app/api/internal/programs/[program]/lists/[list]/revisions/[revision]/file/route.ts': {
    GET: 'program lists.read',
  },
  'app/api/internal/programs/[program]/lists/[list]/revisions/[revision]/rows/route.ts': {
    GET: 'program lists.read',
  },
  'app/api/internal/programs/[program]/lists/[list]/revisions/[revision]/groups/route.ts': {
    GET: 'program lists.read',
  },
  'app/api/internal/programs/[program]/lists/[list]/views/route.ts': { POST: 'program lists.read' },
  'app/api/internal/programs/[program]/lists/[list]/views/[view]/route.ts': {
    PATCH: 'program lists.read',
    DELETE: 'program lists.read',
  },
  'app/api/internal/programs/[program]/lists/[list]/revisions/[revision]/totals/route.ts': {
    GET: 'program lists.read',
  },

  'app/api/v1/openapi.json/route.ts': { GET: 'public' },
  'app/api/v1/health/route.ts': { GET: 'public' },
  'app/api/v1/[...path]/route.ts': {
    DELETE: 'public',
    GET: 'public',
    PATCH: 'public',
    POST: 'public',
    PUT: 'public',
  },
  'app/api/v1/roll-ups/route.ts': { POST: 'token' },
  'app/api/v1/programs/route.ts': { GET: 'token' },
  'app/api/v1/imports/[id]/route.ts': { GET: 'token' },
  'app/api/v1/programs/[program]/baselines/route.ts': { GET: 'token baselines.read' },
  'app/api/v1/programs/[program]/baselines/[number]/route.ts': { GET: 'token baselines.read' },
  'app/api/v1/programs/[program]/baselines/[number]/csv/route.ts': { GET: 'token baselines.read' },
  'app/api/v1/programs/[program]/baselines/[number]/conditions/[condition]/route.ts': {
    GET: 'token baselines.read',
  },
  'app/api/v1/programs/[program]/baselines/[number]/angular-momentum/route.ts': {
    GET: 'token baselines.read',
  },
  'app/api/v1/programs/[program]/lists/[list]/route.ts': { PUT: 'token lists.keep' },
  'app/api/v1/programs/[program]/lists/[list]/revisions/route.ts': { POST: 'token lists.keep' },
};

export interface Entry {
  readonly file: string;
  readonly name: string;
  /** `public`, `site`, `program` or `token`, each with its action or ''. */
  readonly asks: readonly { readonly kind: string; readonly action: string }[];
}

export const ENTRIES: readonly Entry[] = Object.entries(ACCESS).flatMap(([file, handlers]) =>
  Object.entries(handlers).map(([name, words]) => ({
    file,
    name,
    asks: words.split(', ').map((each) => {
      const [kind = '', action = ''] = each.split(' ');
      return { kind, action };
    }),
  })),
);
