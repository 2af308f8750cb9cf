/** Whether two states say the same, whatever order their fields stand in. A field without a value counts as not there. */
export const sameState = (a: unknown, b: unknown): boolean => ordered(a) === ordered(b);

const ordered = (value: unknown): string =>
  JSON.stringify(value, (_, inner: unknown) =>
    typeof inner === 'object' && inner !== null && !Array.isArray(inner)
      ? Object.fromEntries(
          Object.entries(inner)
            .filter(([, v]) => v !== undefined)
            .sort(([x], [y]) => (x < y ? -1 : 1)),
        )
      : inner,
  );
