'use server';

import { redirect } from 'next/navigation';
import {
  formerFrameSchema,
  formerOfForm,
  frameIssueSchema,
  geometryOfForm,
} from '@/lib/contracts/frame-issue';
import {
  allowanceChoiceSchema,
  allowanceSchema,
  buildSchema,
  limitChoiceSchema,
  limitInSi,
  limitSchema,
  referencePointSchema,
} from '@/lib/contracts/program-settings';
import { serverDb } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';
import { addBuild } from '@/lib/server/programs/add-build';
import { addReferencePoint } from '@/lib/server/programs/add-reference-point';
import { stateFormerFrame } from '@/lib/server/programs/frame-step';
import { issueFrame } from '@/lib/server/programs/issue-frame';
import { removeAllowance, setAllowance } from '@/lib/server/programs/set-allowance';
import { removeLimit, stateLimit } from '@/lib/server/programs/set-limit';
import { toSi } from '@/lib/units/convert';

export const issueFrameAction = programAction(
  'frame.keep',
  frameIssueSchema,
  async ({ input, person, program }) => {
    await issueFrame(serverDb(), {
      person,
      programId: program.id,
      base: input.base,
      title: input.title,
      geometry: geometryOfForm(input),
      validFrom: input.valid_from,
      reason: input.reason,
      former: input.base === 0 ? null : formerOfForm(input),
      carryPoints: input.carry_points,
    });
    redirect(`/programs/${program.code}/settings?length=${input.length_unit}`);
  },
);

export const stateFormerFrameAction = programAction(
  'frame.keep',
  formerFrameSchema,
  async ({ input, person, program }) => {
    const { number } = input;
    await stateFormerFrame(serverDb(), {
      person,
      programId: program.id,
      number,
      former: formerOfForm(input),
    });
    return { message: `What is stated in issue ${number - 1} can be converted to issue ${number} now.` };
  },
);

export const addReferencePointAction = programAction(
  'reference-points.keep',
  referencePointSchema,
  async ({ input, person, program }) => {
    const { code, title, x, y, z } = input;
    const metres = (value: number): number => toSi(value, input.length_unit);
    await addReferencePoint(serverDb(), {
      person,
      programId: program.id,
      code,
      title,
      place: [metres(x), metres(y), metres(z)],
    });
    return { message: `${code} is a reference point.` };
  },
);

export const addBuildAction = programAction(
  'builds.keep',
  buildSchema,
  async ({ input, person, program }) => {
    await addBuild(serverDb(), {
      person,
      programId: program.id,
      code: input.code,
      title: input.title,
      kind: input.kind,
      serialFrom: input.serial_from,
      serialTo: input.serial_to,
      isDefault: input.is_default,
    });
    return { message: `${input.title} is a build.` };
  },
);

export const setLimitAction = programAction(
  'limits.keep',
  limitSchema,
  async ({ input, person, program }) => {
    const { id, quantity, sense, kind, group, condition, source, from, until } = input;
    await stateLimit(serverDb(), {
      person,
      programId: program.id,
      id,
      limit: {
        quantity,
        sense,
        kind,
        group,
        condition,
        value: limitInSi(input),
        source,
        sourceDate: input.source_date,
        from,
        until,
      },
    });
    return { message: 'The limit is set. It counts from the next roll-up of a configuration.' };
  },
);

export const removeLimitAction = programAction(
  'limits.keep',
  limitChoiceSchema,
  async ({ input, person, program }) => {
    await removeLimit(serverDb(), { person, programId: program.id, id: input.id });
  },
);

export const setAllowanceAction = programAction(
  'allowances.keep',
  allowanceSchema,
  async ({ input, person, program }) => {
    const { maturity, group, percent, source } = input;
    await setAllowance(serverDb(), {
      person,
      programId: program.id,
      group,
      maturity,
      fraction: percent / 100,
      source,
    });
    return { message: 'The allowance is set. It counts from the next roll-up of a configuration.' };
  },
);

export const removeAllowanceAction = programAction(
  'allowances.keep',
  allowanceChoiceSchema,
  async ({ input, person, program }) => {
    await removeAllowance(serverDb(), { person, programId: program.id, ...input });
  },
);
