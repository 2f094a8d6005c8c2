import type { MailKind } from '@stillstroke/contract/mail';
import type { Letter } from './letter';
import type { MailData } from './mail-data';

/** What every template may use. */
export interface Occasion<K extends MailKind> {
  readonly data: MailData<K>;
  readonly reader: { readonly name: string; readonly clubName: string };
  /** Address of a page of ours. */
  readonly pageUrl: (path: string) => string;
  /** The link that opens the account, for the kinds that have one, and until when (ISO 8601 UTC). */
  readonly accountLink: { readonly url: string; readonly until: string } | null;
}

type Template<K extends MailKind> = (
  occasion: Occasion<K>,
) => Pick<Letter, 'paragraphs' | 'button' | 'small' | 'why'>;

/** Subjects name nobody and tell nothing: they show on locked screens. */
export const subjects: Record<MailKind, string> = {
  invitation: 'Your invitation to Stillstroke',
  'password-reset': 'Your new password for Stillstroke',
  'review-sent': 'A review is ready for you',
  question: 'A question is waiting for you',
  answer: 'There is an answer for you',
  'promise-reminder': 'A date you promised is close',
};

export const templates: { readonly [K in MailKind]: Template<K> } = {
  invitation: ({ reader, accountLink }) => ({
    paragraphs: [
      `${reader.clubName} has made you an account on Stillstroke, where coaches measure front-crawl arms on film and athletes read what was found.`,
      'Set your password and you are in.',
    ],
    button: { words: 'Set your password', url: accountLink?.url ?? '' },
    small: [
      `The link works once, until ${sayMoment(accountLink?.until)}. Do not pass it on: whoever opens it sets your password.`,
    ],
    why: `You get this because an admin of ${reader.clubName} invited you.`,
  }),

  'password-reset': ({ reader, accountLink }) => ({
    paragraphs: ['Somebody, we hope you, asked for a new password for your account on Stillstroke.'],
    button: { words: 'Set a new password', url: accountLink?.url ?? '' },
    small: [
      `The link works once, until ${sayMoment(accountLink?.until)}. Setting a new password signs you out everywhere else.`,
      'If it was not you, leave this mail alone: your password stays as it is.',
    ],
    why: `You get this because you have an account at ${reader.clubName}.`,
  }),

  'review-sent': ({ data, reader, pageUrl }) => ({
    paragraphs: [
      `${data.from} has written a review of your swimming. It begins with the one thing to work on.`,
    ],
    button: { words: 'Read the review', url: pageUrl(data.page) },
    small: [],
    why: member(reader.clubName),
  }),

  question: ({ data, reader, pageUrl }) => ({
    paragraphs: [`${data.from} has asked you something and waits for your answer.`],
    button: { words: 'Read the question', url: pageUrl(data.page) },
    small: [],
    why: member(reader.clubName),
  }),

  answer: ({ data, reader, pageUrl }) => ({
    paragraphs: [`${data.from} has answered you.`],
    button: { words: 'Read the answer', url: pageUrl(data.page) },
    small: [],
    why: member(reader.clubName),
  }),

  'promise-reminder': ({ data, reader, pageUrl }) => ({
    paragraphs: [
      `You promised ${data.forWhom} a review by ${sayDay(data.promised)}. It has not been sent yet.`,
      'If the date cannot be kept, change it: the one who waits sees the new one.',
    ],
    button: { words: 'Go to the review', url: pageUrl(data.page) },
    small: [],
    why: member(reader.clubName),
  }),
};

const member = (clubName: string) => `You get this because you have an account at ${clubName}.`;

const day = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  timeZone: 'UTC',
});
const time = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', timeZone: 'UTC' });

const sayDay = (date: string) => day.format(new Date(`${date}T12:00:00Z`));
/** The reader's time zone is not known, so it is said which one this is. */
const sayMoment = (instant = '') => {
  const at = new Date(instant);
  return Number.isNaN(at.getTime()) ? 'it has been used' : `${day.format(at)}, ${time.format(at)} UTC`;
};
