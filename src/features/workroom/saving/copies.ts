/** A small store of values by key on this machine. */
export interface Copies {
  /** Kept as soon as the browser has it; a later `put` or `remove` of the same key comes after it. */
  put(key: string, value: unknown): void;
  remove(key: string): void;
  /** All whose key begins so. */
  below(prefix: string): Promise<readonly { readonly key: string; readonly value: unknown }[]>;
  close(): void;
}

const NAME = 'foldwright';
const STORE = 'copies';

/** In IndexedDB, which has room for a whole project and does not hold up typing; in local storage where it is forbidden. */
export async function openCopies(): Promise<Copies> {
  const plain = inLocalStorage();
  const database = await openDatabase().catch(() => null);
  return database === null ? plain : inDatabase(database, plain);
}

function openDatabase(): Promise<IDBDatabase> {
  return new Promise((resolve, reject) => {
    const request = indexedDB.open(NAME, 1);
    request.onupgradeneeded = () => request.result.createObjectStore(STORE);
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(request.error ?? new Error('IndexedDB does not open.'));
    request.onblocked = () => reject(new Error('Another tab holds an older IndexedDB open.'));
  });
}

function inDatabase(database: IDBDatabase, plain: Copies): Copies {
  const change = (work: (store: IDBObjectStore) => void, otherwise: () => void): void => {
    try {
      const transaction = database.transaction(STORE, 'readwrite');
      transaction.onabort = otherwise;
      work(transaction.objectStore(STORE));
    } catch {
      otherwise();
    }
  };
  return {
    put: (key, value) =>
      change(
        (store) => void store.put(value, key),
        () => plain.put(key, value),
      ),
    remove(key) {
      plain.remove(key);
      change(
        (store) => void store.delete(key),
        () => undefined,
      );
    },
    async below(prefix) {
      const range = IDBKeyRange.bound(prefix, `${prefix}\uffff`);
      const found = await new Promise<{ key: string; value: unknown }[]>((resolve) => {
        const read: { key: string; value: unknown }[] = [];
        const request = database.transaction(STORE).objectStore(STORE).openCursor(range);
        request.onerror = () => resolve(read);
        request.onsuccess = () => {
          const cursor = request.result;
          if (cursor === null) return resolve(read);
          read.push({ key: String(cursor.key), value: cursor.value as unknown });
          cursor.continue();
        };
      });
      const kept = new Set(found.map(({ key }) => key));
      return [...found, ...(await plain.below(prefix)).filter(({ key }) => !kept.has(key))];
    },
    close: () => database.close(),
  };
}

/** Holds five megabytes at most; what does not fit is left out, since the copy is a second net. */
function inLocalStorage(): Copies {
  const attempt = <T>(work: () => T): T | undefined => {
    try {
      return work();
    } catch {
      return undefined;
    }
  };
  return {
    put: (key, value) => void attempt(() => localStorage.setItem(key, JSON.stringify(value))),
    remove: (key) => void attempt(() => localStorage.removeItem(key)),
    async below(prefix) {
      const keys = attempt(() => Object.keys(localStorage)) ?? [];
      return keys
        .filter((key) => key.startsWith(prefix))
        .map((key) => ({ key, value: attempt((): unknown => JSON.parse(localStorage.getItem(key) ?? 'null')) }));
    },
    close: () => undefined,
  };
}
