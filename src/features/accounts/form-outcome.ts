/** What a form's handler hands to its page when there is something to show again. */
export interface FormFaults {
  readonly status: number;
  /** By field name; '' is for the form as a whole. */
  readonly faults: Readonly<Record<string, string>>;
  /** What was typed, to be shown again; never a password. */
  readonly typed: Readonly<Record<string, string>>;
}

export const formFaults = (
  status: number,
  faults: FormFaults['faults'],
  typed: FormFaults['typed'] = {},
): FormFaults => ({ status, faults, typed });

/** Goes on to a page after a form was taken; reloading that page does not send the form again. */
export const seeOther = (path: string): Response => new Response(null, { status: 303, headers: { location: path } });
