/**
 * The reason of a failure in words without a full stop, with the one case in which a person can do something told plainly.
 *
 * @param reason  whatever was thrown
 */
export function wordsOf(reason: unknown): string {
  const { code, message } = (reason instanceof Error ? reason : { message: String(reason) }) as { code?: unknown; message: string };
  const words = message.trim().replace(/^Uncaught (?:\w*Error: )?/, "").replace(/\.$/, "") || "no reason was given";
  const ranOut = code === "ERR_WORKER_OUT_OF_MEMORY" || /out of memory|allocation failed|invalid (typed )?array( buffer)? length/i.test(message);
  return ranOut ? `its memory ran out (${words}); fewer threads, or a smaller foundation, need less` : words;
}
