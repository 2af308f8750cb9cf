/** The letters about accounts, as plain text. The address stands alone on its line, so that every mail program links it. */
export interface AccountLetter {
  readonly subject: string;
  readonly text: string;
}

const letter = (subject: string, ...paragraphs: readonly string[]): AccountLetter => ({
  subject,
  text: `${paragraphs.join('\n\n')}\n`,
});

export function signInLetter({
  address,
  minutes,
  isNew,
}: {
  address: string;
  minutes: number;
  isNew: boolean;
}): AccountLetter {
  return letter(
    'Your sign-in link for Foldwright',
    isNew
      ? 'Somebody, we hope you, asked to sign in to Foldwright with this address. There is no account with it yet: using the link makes one.'
      : 'Somebody, we hope you, asked to sign in to Foldwright with this address.',
    `To sign in, open this page and press the button there. It works once, for ${minutes} minutes:`,
    address,
    'If you did not ask for it, do nothing: nobody can sign in without this letter.',
  );
}

export function signUpLetter({
  address,
  name,
  hours,
}: {
  address: string;
  name: string;
  hours: number;
}): AccountLetter {
  return letter(
    'Confirm your Foldwright account',
    `Hello ${name},`,
    `somebody, we hope you, made an account at Foldwright with this address. To confirm it, open this page within ${hours} hours and press the button there:`,
    address,
    'If it was not you, do nothing: without this step there is no account, and what was typed is forgotten.',
  );
}

/** To somebody who has an account and whose address was given on the sign-up page. */
export function alreadyKnownLetter({ signIn }: { signIn: string }): AccountLetter {
  return letter(
    'You already have a Foldwright account',
    'Somebody, perhaps you, wanted to make an account at Foldwright with this address. You have one already, and nothing about it was changed.',
    'To sign in, or to have a link sent if you no longer know the password:',
    signIn,
    'If it was not you, do nothing.',
  );
}

export function invitationLetter({
  address,
  invitedBy,
  days,
}: {
  address: string;
  invitedBy: string;
  days: number;
}): AccountLetter {
  return letter(
    'You are invited to write for Foldwright',
    `${invitedBy} invites you to publish your own cardstock projects at Foldwright as an author.`,
    `To accept, open this page within ${days} days:`,
    address,
    'If you do not want to, do nothing. No account is made without you.',
  );
}

/** To an author whom another asks to work on a project together. */
export function coAuthorLetter({
  address,
  invitedBy,
  title,
}: {
  address: string;
  invitedBy: string;
  title: string;
}): AccountLetter {
  return letter(
    'You are invited to work on a project',
    `${invitedBy} invites you to work on “${title}” at Foldwright. You could change and publish it; deleting it and telling subscribers stay with its owner.`,
    'The invitation waits in your workroom, where you can accept or decline it:',
    address,
    'If you do not want to, do nothing.',
  );
}

/** To whoever planned an edition: it is out, or why it is not. */
export function scheduleLetter({
  address,
  title,
  problem,
}: {
  address: string;
  title: string;
  problem: string | null;
}): AccountLetter {
  return problem === null
    ? letter(`“${title}” is out`, `The edition of “${title}” that you planned is out. Readers find it here:`, address)
    : letter(
        `“${title}” did not come out`,
        `The time that you planned for “${title}” has come, and it could not be published: ${problem}`,
        'Nothing was changed. Look at it on the desk and publish it from there:',
        address,
      );
}

export function passwordChangedLetter({ signIn }: { signIn: string }): AccountLetter {
  return letter(
    'Your Foldwright password was changed',
    'The password of your account was changed just now, and every other device was signed out.',
    'If it was not you, have a sign-in link sent and set a new one at once:',
    signIn,
  );
}
