import { TextField } from '@/components/ui/text-field';
import { PASSWORD_LENGTH } from '@/lib/contracts/people';
import { type FormState } from '@/lib/form-state';

/** A password to be kept, twice. */
export function NewPasswordFields({ errors }: { readonly errors: FormState['errors'] }) {
  return (
    <>
      <TextField
        name="newPassword"
        type="password"
        label="New password"
        hint={`At least ${PASSWORD_LENGTH} characters; a few words do well.`}
        autoComplete="new-password"
        minLength={PASSWORD_LENGTH}
        required
        error={errors['newPassword']}
      />
      <TextField
        name="repeatPassword"
        type="password"
        label="New password again"
        autoComplete="new-password"
        required
        error={errors['repeatPassword']}
      />
    </>
  );
}
