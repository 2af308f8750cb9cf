/**
 * A part of the page's program that is fetched after the rest. What is asked of it meanwhile waits, the last alone: the page is
 * brought up to date at once when it is there. `lost` is called when something is asked of a part that did not come.
 */
export function later<Part>(coming: Promise<Part>, lost: () => void): (use: (part: Part) => void) => void {
  let state: 'coming' | 'here' | 'lost' = 'coming';
  let here: Part;
  let waiting: ((part: Part) => void) | null = null;
  coming.then(
    (part) => {
      [state, here] = ['here', part];
      waiting?.(part);
    },
    () => {
      state = 'lost';
      if (waiting) lost();
    },
  );
  return (use) => {
    if (state === 'here') use(here);
    else if (state === 'lost') lost();
    else waiting = use;
  };
}
