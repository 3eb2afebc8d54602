/**
 * The least a message channel must do: an in-memory pair, a MessagePort, a child process or a WebSocket all fit.
 * Values are structured-clone data: plain objects, strings, numbers, booleans, null, undefined and typed arrays.
 */
export interface Port {
  post(message: unknown): void;
  onMessage(listener: (message: unknown) => void): void;
  onClose(listener: () => void): void;
  close(): void;
}
