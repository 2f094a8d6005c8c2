import { ComponentHarness } from '@angular/cdk/testing';

/** The "How?" beside a figure. */
export class HowHarness extends ComponentHarness {
  static readonly hostSelector = 'st-how';

  private readonly button = this.locatorFor('button');

  async about(): Promise<string> {
    return ((await (await this.button()).getAttribute('aria-label')) ?? '').replace(/^How\? /, '');
  }

  async open(): Promise<void> {
    await (await this.button()).click();
  }
}

/** The dialog that a "How?" opens. */
export class ExplainHarness extends ComponentHarness {
  static readonly hostSelector = 'st-explain-dialog';

  async text(): Promise<string> {
    return (await (await this.host()).text()).replace(/\s+/g, ' ');
  }

  /** Names of the parts in the order shown. */
  async parts(): Promise<string[]> {
    return this.texts('tbody th');
  }

  /** Shares of the parts as shown. */
  async shares(): Promise<string[]> {
    return this.texts('tbody .share');
  }

  /** Addresses of the frames. */
  async frames(): Promise<string[]> {
    const links = await this.locatorForAll('.frames a')();
    return Promise.all(links.map(async (link) => (await link.getAttribute('href')) ?? ''));
  }

  private async texts(selector: string): Promise<string[]> {
    const found = await this.locatorForAll(selector)();
    return Promise.all(found.map((each) => each.text()));
  }
}
