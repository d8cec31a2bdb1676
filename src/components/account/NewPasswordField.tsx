import type { ComponentProps } from 'react';
import { MIN_PASSWORD_LENGTH } from '#contract/account.ts';
import { TextField } from '#components/ui/index.ts';

/** A password being chosen. */
export function NewPasswordField(props: Partial<ComponentProps<typeof TextField>>) {
  return (
    <TextField
      label="Password"
      type="password"
      autoComplete="new-password"
      hint={`${MIN_PASSWORD_LENGTH} characters or more. A few words are easy to keep and hard to guess.`}
      {...props}
    />
  );
}
