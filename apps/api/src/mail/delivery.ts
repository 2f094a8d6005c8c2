import type { WrittenLetter } from './letter';

/** A mail with everything that goes on the envelope and into the headers. */
export interface Dispatch extends WrittenLetter {
  readonly id: string;
  readonly messageId: string;
  readonly from: string;
  readonly to: { readonly name: string; readonly address: string };
  readonly writtenAt: Date;
  /** Page on which the reader can switch such mails off; null where they cannot. */
  readonly switchOff: string | null;
}

/** How handing over went; reasons are sentences for the admin, without secrets. */
export type Outcome =
  | { readonly how: 'sent' }
  /** For good: trying again would end the same way. */
  | { readonly how: 'refused'; readonly reason: string }
  /** `everything`: it is not this mail, so the next would fare no better now. */
  | { readonly how: 'later'; readonly reason: string; readonly everything: boolean };

/** Hands mails over; never throws. */
export interface Delivery {
  send(mail: Dispatch): Promise<Outcome>;
}
