/** What is timed: it knows its own work and nothing of the runner. */
export interface BenchCase<State = unknown, Answer = unknown> {
  readonly name: string;
  /** size of the work, in words */
  readonly size: string;
  /** makes the input from a fixed stream, outside the timer */
  readonly setup: () => State;
  /** the work; given the number of the run, so that nothing remembered answers for it */
  readonly run: (state: State, round: number) => Answer;
  /** throws when the answer is wrong: a fast wrong answer is no answer */
  readonly check: (answer: Answer, state: State) => void;
  /** what else the answers of the timed runs say, in a line; optional */
  readonly figure?: (answers: readonly Answer[]) => string;
  /** the same work in another language, timed alternately */
  readonly peer?: Peer<State, Answer>;
  readonly target: Target;
  /** timed runs; a median of fewer than 5 says little */
  readonly rounds: number;
}

/** A function of peers.py. */
export interface Peer<State, Answer> {
  readonly name: string;
  /** what it works on, the very numbers of `run` */
  readonly input: (state: State) => Readonly<Record<string, Float64Array | number>>;
  /** throws when both do not agree */
  readonly agree: (ours: Answer, theirs: Float64Array) => void;
}

/** What was promised: at most so many milliseconds, at most so many times the peer's time. */
export interface Target {
  readonly milliseconds?: number;
  readonly ratio?: number;
}
