'use server';

import { redirect } from 'next/navigation';
import {
  returnFormSchema,
  signFormSchema,
  submitFormSchema,
  withdrawFormSchema,
} from '@/lib/contracts/baselines';
import { returnSubmission } from '@/lib/server/baselines/return-submission';
import { signWithPassword } from '@/lib/server/baselines/sign-with-password';
import { submitForm } from '@/lib/server/baselines/submit-form';
import { withdrawBaseline } from '@/lib/server/baselines/withdraw-baseline';
import { serverDb } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';

export const submitConfigurationAction = programAction(
  'baselines.submit',
  submitFormSchema,
  async ({ input, person, program }) => {
    const id = await submitForm(serverDb(), person, program, input);
    redirect(`/programs/${program.code}/baselines/submissions/${id}`);
  },
);

export const signSubmissionAction = programAction(
  'baselines.decide',
  signFormSchema,
  async ({ input, person, program }) => {
    const { submission: submissionId, password, number: offered, supersedes } = input;
    const seen = { number: offered, supersedes };
    const { number } = await signWithPassword(serverDb(), { person, program, submissionId, seen, password });
    redirect(`/programs/${program.code}/baselines/${number}`);
  },
);

export const returnSubmissionAction = programAction(
  'baselines.decide',
  returnFormSchema,
  async ({ input, person, program }) => {
    const { submission: submissionId, reason } = input;
    await returnSubmission(serverDb(), { person, program, submissionId, reason });
    return { message: 'The submission is returned. Whoever submitted it hears of it by mail.' };
  },
);

export const withdrawBaselineAction = programAction(
  'baselines.withdraw',
  withdrawFormSchema,
  async ({ input: { number, reason }, person, program }) => {
    await withdrawBaseline(serverDb(), { person, program, number, reason });
    return { message: `Baseline ${number} is withdrawn.` };
  },
);
