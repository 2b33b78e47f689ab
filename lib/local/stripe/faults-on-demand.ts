/** Troubles of the network that a test asks for: requests that hang until let go, answers that get lost. */
export class FaultsOnDemand {
  private gates: { path: string; opened: Promise<void>; open: () => void }[] = [];
  private waiting: { count: number; tell: () => void }[] = [];
  private hanging = 0;
  private drops: { path: string; times: number }[] = [];

  /** Requests whose address starts with `path` hang from now on. */
  hold(path: string): void {
    let open: () => void = () => undefined;
    const opened = new Promise<void>((resolve) => (open = resolve));
    this.gates.push({ path, opened, open });
  }

  /** Settles once `count` requests hang. */
  async untilHanging(count: number): Promise<void> {
    if (this.hanging >= count) return;
    await new Promise<void>((resolve) => this.waiting.push({ count, tell: resolve }));
  }

  letGo(): void {
    for (const gate of this.gates) gate.open();
    this.gates = [];
  }

  /** The next `times` requests below `path` are carried out, and their answers lost. */
  dropAnswers(path: string, times: number): void {
    this.drops.push({ path, times });
  }

  async pass(path: string): Promise<void> {
    const gate = this.gates.find((one) => path.startsWith(one.path));
    if (!gate) return;
    this.hanging += 1;
    for (const one of this.waiting) if (this.hanging >= one.count) one.tell();
    this.waiting = this.waiting.filter((one) => this.hanging < one.count);
    await gate.opened;
    this.hanging -= 1;
  }

  losesAnswer(path: string): boolean {
    const drop = this.drops.find((one) => one.times > 0 && path.startsWith(one.path));
    if (!drop) return false;
    drop.times -= 1;
    return true;
  }
}
