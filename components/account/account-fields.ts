const LEAST_CHARACTERS = 10;

const email = {
  name: 'email',
  label: 'E-mail',
  autoComplete: 'email',
  inputMode: 'email',
  rules: {
    required: 'Give your e-mail address.',
    pattern: { value: /^\s*[^\s@]+@[^\s@]+\.[^\s@]+\s*$/, message: 'Give an e-mail address such as name@example.com.' },
  },
} as const;

/** The fields of the account's forms. The library checks them again; these are the words beside the field. */
export const accountFields = {
  name: {
    name: 'name',
    label: 'Name',
    autoComplete: 'name',
    autoCapitalize: 'words',
    maxLength: 120,
    rules: { required: 'Give your name.' },
  },
  email,
  username: { ...email, autoComplete: 'username' },
  password: {
    name: 'password',
    label: 'Password',
    autoComplete: 'current-password',
    autoCapitalize: 'none',
    secret: true,
    rules: { required: 'Give your password.' },
  },
  newPassword: {
    name: 'password',
    label: 'New password',
    hint: 'At least ten characters. A few words are better than one strange one.',
    autoComplete: 'new-password',
    autoCapitalize: 'none',
    secret: true,
    rules: {
      required: 'Choose a password.',
      minLength: { value: LEAST_CHARACTERS, message: 'Take at least ten characters.' },
    },
  },
} as const;

export type AccountField = keyof typeof accountFields;
