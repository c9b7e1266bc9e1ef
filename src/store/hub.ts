// How the tabs of one browser tell each other what happened: messages to the others, never to the tab that sent them.
//
// 1. A message says that something is already so (kept, removed), or asks another tab for something; it never carries the work itself.
// 2. A browser without such a channel works as if there were no other tab; the writer and rev of each row still protect the work.
// Not here: who may write (holder.ts).

export type Message =
  /** A sheet has a new state in the database. */
  | { readonly kind: 'kept'; readonly sheet: string; readonly rev: number }
  /** The list of the shelf, its trash or its templates changed. */
  | { readonly kind: 'shelf' }
  | { readonly kind: 'removed'; readonly sheet: string }
  | { readonly kind: 'restored'; readonly sheet: string }
  /** The tab asks the writer of the sheet to hand it over. */
  | { readonly kind: 'ask'; readonly sheet: string; readonly tab: string }
  /** The writer has kept everything and stopped. */
  | { readonly kind: 'handed'; readonly sheet: string; readonly to: string };

export interface Hub {
  post(message: Message): void;
  subscribe(listener: (message: Message) => void): () => void;
  close(): void;
}

export function openHub(name: string): Hub {
  const listeners = new Set<(message: Message) => void>();
  const channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel(name);
  if (channel !== null) {
    channel.onmessage = (event: MessageEvent<Message>) => {
      for (const listener of [...listeners]) listener(event.data);
    };
  }
  return {
    post: (message) => channel?.postMessage(message),
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    close() {
      listeners.clear();
      channel?.close();
    },
  };
}
