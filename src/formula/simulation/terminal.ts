/** Where a command speaks and listens; a test hands in one of its own. */
export interface Terminal {
  out(text: string): void;
  err(text: string): void;
  /** whether standard error shows lines that replace each other */
  readonly isLive: boolean;
  /** calls back when the person presses Ctrl-C; returns what ends that */
  onInterrupt(handler: () => void): () => void;
}

/** The terminal of this process. */
export function ownTerminal(): Terminal {
  return {
    out: (text) => void process.stdout.write(text),
    err: (text) => void process.stderr.write(text),
    isLive: process.stderr.isTTY === true,
    onInterrupt: (handler) => {
      const signals = ["SIGINT", "SIGTERM"] as const;
      for (const signal of signals) process.on(signal, handler);
      return () => {
        for (const signal of signals) process.off(signal, handler);
      };
    },
  };
}
