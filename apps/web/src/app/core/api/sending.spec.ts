import { HttpErrorResponse } from '@angular/common/http';
import { Subject } from 'rxjs';
import { Sending } from './sending';

const refusal = (more: object) =>
  new HttpErrorResponse({
    status: 400,
    error: { type: 'x', title: 'x', status: 400, code: 'bad-request', detail: 'Not like this.', ...more },
  });

describe('Sending', () => {
  it('sends one at a time and stays busy until it is answered', () => {
    const sending = new Sending();
    const [first, second] = [new Subject<number>(), new Subject<number>()];
    const got: number[] = [];
    sending.send(first, (answer) => got.push(answer));
    sending.send(second, (answer) => got.push(answer));
    expect(sending.sending()).toBe(true);
    expect(second.observed).toBe(false);
    first.next(1);
    expect(got).toEqual([1]);
    expect(sending.refusal()).toBeNull();
  });

  it('is free again after a refusal, with the words about the field before those about the whole', () => {
    const sending = new Sending();
    const refused: string[] = [];
    const first = new Subject<number>();
    sending.send(
      first,
      () => undefined,
      ({ code }) => refused.push(code),
    );
    first.error(refusal({}));
    expect([sending.sending(), sending.refusal(), refused]).toEqual([
      false,
      'Not like this.',
      ['bad-request'],
    ]);
    const second = new Subject<number>();
    sending.send(second, () => undefined);
    second.error(refusal({ issues: [{ path: 'name', message: 'Give a name.' }] }));
    expect(sending.refusal()).toBe('Give a name.');
  });
});
