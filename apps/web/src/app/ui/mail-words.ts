import type { MailKind, MailStatus, SwitchableMail } from '@stillstroke/contract/mail';

/** What each mail is called in lists. */
export const mailKindWords: Record<MailKind, string> = {
  invitation: 'Invitation',
  'password-reset': 'New password',
  'review-sent': 'Review sent',
  question: 'Question',
  answer: 'Answer',
  'promise-reminder': 'Reminder of a promised date',
};

/** When each mail that can be switched off comes, for its reader. */
export const mailOccasions: Record<SwitchableMail, string> = {
  'review-sent': 'When a review is sent to you',
  question: 'When somebody asks you something',
  answer: 'When somebody answers you',
  'promise-reminder': 'Before a date you promised, while the review is not sent',
};

export const mailStatusWords: Record<MailStatus, string> = {
  waiting: 'waiting',
  sending: 'being sent',
  sent: 'sent',
  'given-up': 'given up',
  withheld: 'not sent',
};
