import { z } from 'zod';
import { MEMBER_ROLES } from '@/lib/permissions';

export const PASSWORD_LENGTH = 12;

export const emailSchema = z
  .string('Enter a mail address.')
  .trim()
  .toLowerCase()
  .min(1, 'Enter a mail address.')
  .max(254, 'A mail address has at most 254 characters.')
  .pipe(z.email('This is not a mail address: it needs the form name@company.example.'));

export const nameSchema = z
  .string('Enter a name.')
  .trim()
  .min(1, 'Enter a name.')
  .max(100, 'Use at most 100 characters.');

const newPasswordSchema = z
  .string('Choose a password.')
  .min(PASSWORD_LENGTH, `Use at least ${PASSWORD_LENGTH} characters; a few words do well.`)
  .max(200, 'Use at most 200 characters.');

/** A password that is to be kept, and once more; NIST SP 800-63B asks for length and no mixture rules. */
const chosenPassword = { newPassword: newPasswordSchema, repeatPassword: z.string('Repeat the password.') };
const SAME = { path: ['repeatPassword'], error: 'The two passwords differ.' };
const same = (form: { newPassword: string; repeatPassword: string }) =>
  form.newPassword === form.repeatPassword;

export const signInSchema = z.object({
  email: emailSchema,
  password: z.string('Enter your password.').min(1, 'Enter your password.').max(200),
  next: z.string().max(2000).optional(),
});

export const passwordResetRequestSchema = z.object({ email: emailSchema });

const linkSecret = z.string().min(1).max(200);

export const invitationSchema = z
  .object({ linkSecret, name: nameSchema, ...chosenPassword })
  .refine(same, SAME);

export const passwordResetSchema = z.object({ linkSecret, ...chosenPassword }).refine(same, SAME);

export const passwordChangeSchema = z
  .object({
    currentPassword: z.string('Enter your present password.').min(1, 'Enter your present password.').max(200),
    ...chosenPassword,
  })
  .refine(same, SAME);

export const mailWishSchema = z.object({
  wish: z.enum(['all', 'decisions', 'none'], 'Choose which mails you want.'),
});

const optionalName = z.union([z.literal('').transform(() => undefined), nameSchema]).optional();
const userId = z.string().min(1).max(64);

export const personSchema = z.object({
  email: emailSchema,
  name: nameSchema,
  admin: z.literal('on').optional(),
});

export const personChoiceSchema = z.object({ userId });

const role = z.enum(MEMBER_ROLES, 'Choose a role.');

export const newMemberSchema = z.object({ email: emailSchema, name: optionalName, role });

export const memberRoleSchema = z.object({ userId, role });

export const memberChoiceSchema = z.object({ userId });

export const chiefSchema = { chiefEmail: emailSchema, chiefName: optionalName };
