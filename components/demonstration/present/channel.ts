/** What the two windows of one presentation say to each other. */
export type Message =
  | { readonly kind: 'at'; readonly index: number; readonly startedAt: number; readonly blank: boolean }
  | { readonly kind: 'ask' }
  | { readonly kind: 'go'; readonly index: number }
  | { readonly kind: 'blank'; readonly blank: boolean };

export function openChannel(demonstrationId: string, onMessage: (message: Message) => void) {
  const channel = new BroadcastChannel(`selvedge-demonstration-${demonstrationId}`);
  channel.onmessage = (event: MessageEvent<Message>) => onMessage(event.data);
  return { send: (message: Message) => channel.postMessage(message), close: () => channel.close() };
}
