'use server';

import { redirect } from 'next/navigation';
import { conditionsOf } from '@/db/queries/configurations';
import {
  conditionChoiceSchema,
  conditionFormSchema,
  configurationSeenSchema,
  frameChoiceSchema,
  newConfigurationSchema,
  pinsFormSchema,
  takeNewestSchema,
} from '@/lib/contracts/configuration-forms';
import { fieldError } from '@/lib/errors';
import { chooseFrame } from '@/lib/server/configurations/choose-frame';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { reachConfiguration } from '@/lib/server/configurations/reach-configuration';
import { rollUpConfiguration } from '@/lib/server/configurations/roll-up-configuration';
import { removeCondition, saveCondition } from '@/lib/server/configurations/save-condition';
import { takeRevision } from '@/lib/server/configurations/take-revision';
import { serverDb } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';

export const createConfigurationAction = programAction(
  'configurations.keep',
  newConfigurationSchema,
  async ({ input, person, program }) => {
    await createConfiguration(serverDb(), {
      person,
      programId: program.id,
      buildCode: input.build,
      code: input.code,
      title: input.title,
      ...(input.frame_issue === null ? {} : { frameIssue: input.frame_issue }),
    });
    redirect(`/programs/${program.code}/configurations/${input.code}`);
  },
);

export const rollUpAction = programAction(
  'configurations.keep',
  configurationSeenSchema,
  async ({ input, person, program }) => {
    const configuration = await reachConfiguration(serverDb(), program.id, input.configuration);
    await rollUpConfiguration(serverDb(), { person, configuration });
  },
);

export const takeRevisionAction = programAction(
  'configurations.keep',
  takeNewestSchema,
  async ({ input, person, program }) => {
    const { version, list, revision } = input;
    const configuration = await reachConfiguration(serverDb(), program.id, input.configuration);
    await takeRevision(serverDb(), { person, configuration, version, list, revision });
  },
);

export const pinRevisionsAction = programAction(
  'configurations.keep',
  pinsFormSchema,
  async ({ input, person, program }) => {
    const { version, revisions, rotors } = input;
    const configuration = await reachConfiguration(serverDb(), program.id, input.configuration);
    await pinRevisions(serverDb(), { person, configuration, version, revisions, rotors });
    redirect(`/programs/${program.code}/configurations/${configuration.code}`);
  },
);

export const chooseFrameAction = programAction(
  'configurations.keep',
  frameChoiceSchema,
  async ({ input, person, program }) => {
    const { version, frame_issue: frameIssue } = input;
    const configuration = await reachConfiguration(serverDb(), program.id, input.configuration);
    await chooseFrame(serverDb(), { person, configuration, version, frameIssue });
    redirect(`/programs/${program.code}/configurations/${configuration.code}`);
  },
);

export const saveConditionAction = programAction(
  'configurations.keep',
  conditionFormSchema,
  async ({ input, person, program }) => {
    const { version, condition, isNew } = input;
    const configuration = await reachConfiguration(serverDb(), program.id, input.configuration);
    const known = isNew ? await conditionsOf(serverDb(), configuration.id) : [];
    if (known.some(({ code }) => code === condition.code))
      throw fieldError('code', `There is a condition ${condition.code} here already.`);
    await saveCondition(serverDb(), { person, configuration, version, condition });
    redirect(`/programs/${program.code}/configurations/${configuration.code}/conditions`);
  },
);

export const removeConditionAction = programAction(
  'configurations.keep',
  conditionChoiceSchema,
  async ({ input, person, program }) => {
    const { version, code } = input;
    const configuration = await reachConfiguration(serverDb(), program.id, input.configuration);
    await removeCondition(serverDb(), { person, configuration, version, code });
  },
);
