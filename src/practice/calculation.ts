import { CommandType } from "@univerjs/core";
import type { FUniver } from "@univerjs/core/facade";

// the grid gathers changes for 100 ms before it calculates; a burst of changes is one change to whoever listens
const QUIET_MILLISECONDS = 150;

const CHANGES = /set-range-values|array-formula-data|worksheet|defined-name|row|col/;

/** Knows when the grid's cells have changed and all that depends on them is calculated. */
export class Calculation {
  private running = false;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private readonly handlers = new Set<() => void>();

  constructor(grid: FUniver) {
    const formulas = grid.getFormula();
    formulas.calculationStart(() => {
      this.running = true;
    });
    formulas.calculationEnd(() => {
      this.running = false;
      this.wait();
    });
    grid.onCommandExecuted((command) => {
      if (command.type === CommandType.MUTATION && CHANGES.test(command.id)) this.wait();
    });
  }

  /**
   * Calls back each time the cells have come to rest after a change.
   *
   * @returns a function that ends the calls
   */
  onSettled(handler: () => void): () => void {
    this.handlers.add(handler);
    return () => this.handlers.delete(handler);
  }

  private wait(): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => {
      if (this.running) return;
      for (const handler of this.handlers) handler();
    }, QUIET_MILLISECONDS);
  }
}
