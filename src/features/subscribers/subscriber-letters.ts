/** What the letters to someone who signed up say. Nothing that was typed into the form stands in them. */
export interface LetterWords {
  readonly subject: string;
  readonly text: string;
}

export const confirmLetter = ({
  listName,
  url,
  days,
}: {
  listName: string;
  url: string;
  days: number;
}): LetterWords => ({
  subject: `Confirm that you want mail from ${listName}`,
  text: `Someone, most likely you, asked for mail about new boxes from ${listName} at this address.

To begin, open this page and press the button there:

${url}

The link works for ${days} days. If it was not you, do nothing: without the button nothing more comes, and the address is forgotten.
`,
});

export const alreadyLetter = ({
  listName,
  preferences,
  leave,
}: {
  listName: string;
  preferences: string;
  leave: string;
}): LetterWords => ({
  subject: `You already get mail from ${listName}`,
  text: `Someone, most likely you, asked for mail about new boxes from ${listName} at this address. You are on the list already, so nothing has changed.

Change what you get:

${preferences}

Leave the list:

${leave}
`,
});
