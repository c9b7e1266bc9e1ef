// Whether the browser promises to keep what it keeps: asked for once, readable at any time.
//
// 1. Asked for once in a browser, after the first sheet of the user's own is kept: only then is there something to keep.
// 2. A refusal is no trouble: sheets stay until the browser runs out of room, and the shelf offers the export.

export interface Persistence {
  /** `unknown`: the browser does not say. */
  readonly state: 'promised' | 'while there is room' | 'unknown';
  /** Bytes used by this page and bytes it may use, where the browser says. */
  readonly used: number | null;
  readonly allowed: number | null;
  readonly message: string;
}

const words: Readonly<Record<Persistence['state'], string>> = {
  promised: 'The browser has promised to keep the sheets until you remove them.',
  'while there is room':
    'The browser keeps the sheets as long as it has room. Export everything now and then, or save sheets as files.',
  unknown: 'The browser does not say how long it keeps the sheets. Export everything now and then, or save sheets as files.',
};

export async function readPersistence(storage: StorageManager | undefined): Promise<Persistence> {
  const ask = async <T>(question: (() => Promise<T>) | undefined): Promise<T | null> => {
    try {
      return (await question?.()) ?? null;
    } catch {
      return null;
    }
  };
  const persisted = await ask(storage?.persisted?.bind(storage));
  const estimate = await ask(storage?.estimate?.bind(storage));
  const state = persisted === null ? 'unknown' : persisted ? 'promised' : 'while there is room';
  return { state, used: estimate?.usage ?? null, allowed: estimate?.quota ?? null, message: words[state] };
}

/** Asks the browser; false where it refuses or cannot be asked. */
export async function askToPersist(storage: StorageManager | undefined): Promise<boolean> {
  try {
    return (await storage?.persist?.()) ?? false;
  } catch {
    return false;
  }
}
