import { ComponentHarness } from '@angular/cdk/testing';

/** The signing page as somebody with a finger sees it. */
export class SignSheetHarness extends ComponentHarness {
  static readonly hostSelector = 'kb-sign-sheet';

  /** Presses the button whose words begin so. */
  async press(words: string): Promise<void> {
    for (const button of await this.locatorForAll('button')()) {
      if (!(await button.text()).startsWith(words)) continue;
      await button.click();
      return this.settle();
    }
    throw new Error(`no button says "${words}"`);
  }

  async typePin(digits: string): Promise<void> {
    for (const digit of digits) await this.press(digit);
    await this.press('OK');
  }

  async text(): Promise<string> {
    return (await this.host()).text();
  }

  async isOpen(selector: 'kb-pin-entry' | 'kb-cannot-sign' | 'kb-sign-pane'): Promise<boolean> {
    return (await this.locatorForOptional(selector)()) !== null;
  }

  async language(): Promise<string | null> {
    return (await this.locatorFor('kb-sign-pane')()).getAttribute('lang');
  }

  async hasWayOut(): Promise<boolean> {
    return (await this.locatorForAll('a')()).length > 0;
  }

  /** Sealing, storage and sending run on their own tasks: a few turns of the clock without news, and never while the PIN is being checked. */
  async settle(): Promise<void> {
    let before = '';
    for (let quiet = 0, turn = 0; quiet < 12 && turn < 1000; turn += 1) {
      await new Promise((resolve) => setTimeout(resolve, 4));
      await this.forceStabilize();
      const now = await this.text();
      const isChecking = (await this.locatorForOptional('kb-pin-entry [role="status"] p')()) !== null;
      quiet = now === before && !isChecking ? quiet + 1 : 0;
      before = now;
    }
  }
}
