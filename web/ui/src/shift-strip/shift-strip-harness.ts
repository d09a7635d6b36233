import { ComponentHarness, type TestElement, type TestKey } from '@angular/cdk/testing';

/** Drives a shift strip in tests, so that pages need not know its inner names. Blocks are found by their words. */
export class ShiftStripHarness extends ComponentHarness {
  static readonly hostSelector = 'kb-shift-strip';

  private readonly blocks = this.locatorForAll('.block');
  private readonly lanes = this.locatorForAll('.lane[role="group"]');
  private readonly timeInputs = this.locatorForAll('.times input');

  /** "Floor grinding, Dov Lindqvist: 07:00 to 09:10" for each block, in order. */
  async blockWords(): Promise<readonly string[]> {
    const blocks = await this.blocks();
    return Promise.all(
      blocks.map(async (block) => {
        const [label, times] = await Promise.all([block.getAttribute('aria-label'), block.getAttribute('aria-valuetext')]);
        return times === null ? `${label}` : `${label}: ${times}`;
      }),
    );
  }

  async laneWords(): Promise<readonly string[]> {
    return Promise.all((await this.lanes()).map(async (lane) => (await lane.text()).replace(/\s+/g, ' ').trim()));
  }

  async press(words: string, key: TestKey, isShift = false): Promise<void> {
    const block = await this.block(words);
    await (isShift ? block.sendKeys({ shift: true }, key) : block.sendKeys(key));
  }

  /** Sets a block's clock time in the line that a click opens. */
  async setTime(words: string, which: 'start' | 'end', time: string): Promise<void> {
    await (await this.block(words)).click();
    const input = (await this.timeInputs())[which === 'start' ? 0 : 1];
    if (!input) throw new Error(`"${words}" opens no times`);
    await input.setInputValue(time);
    await input.dispatchEvent('change');
  }

  private async block(words: string): Promise<TestElement> {
    for (const block of await this.blocks()) if ((await block.getAttribute('aria-label'))?.includes(words)) return block;
    throw new Error(`no block says "${words}"`);
  }
}
