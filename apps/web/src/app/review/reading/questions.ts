import { TextFieldModule } from '@angular/cdk/text-field';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  output,
  signal,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { answerQuestion, askQuestion, type Finding, type Question } from '@stillstroke/contract/reviews';
import { Api } from '../../core/api/api';
import { problemOf } from '../../core/api/problem-of';
import { DeviceStore } from '../../core/device-store';
import { sayInstant } from '../../ui/say-date';

/** Questions under a finding with their answers, and the place where the next one is written. */
@Component({
  selector: 'st-questions',
  imports: [MatButtonModule, MatFormFieldModule, MatInputModule, TextFieldModule],
  template: `
    @for (question of shown(); track question.id) {
      <div class="talk">
        <p class="by st-small st-quiet">{{ question.authorName }}, {{ question.when }}</p>
        <p class="said">{{ question.words }}</p>
        @for (answer of question.answers; track answer.id) {
          <div class="answer">
            <p class="by st-small st-quiet">
              {{ answer.authorName }}, {{ answer.when }}
              @if (answer.fresh) {
                <strong class="fresh">New</strong>
              }
            </p>
            <p class="said">{{ answer.words }}</p>
          </div>
        }
        @if (may() === 'answer') {
          @if (answering() === question.id) {
            <form (submit)="send($event)">
              <mat-form-field appearance="outline" subscriptSizing="dynamic">
                <mat-label>Your answer</mat-label>
                <textarea
                  #answerWords
                  matInput
                  cdkTextareaAutosize
                  maxlength="2000"
                  [value]="words()"
                  (input)="type(answerWords.value)"
                ></textarea>
              </mat-form-field>
              <button matButton="filled" type="submit" [disabled]="!canSend()">Send the answer</button>
            </form>
          } @else {
            <button matButton type="button" (click)="open(question.id)">
              {{ question.answers.length === 0 ? 'Answer' : 'Answer again' }}
            </button>
          }
        }
      </div>
    }
    @if (may() === 'ask') {
      @if (answering() === finding().id) {
        <form (submit)="send($event)">
          <mat-form-field appearance="outline" subscriptSizing="dynamic">
            <mat-label>Your question</mat-label>
            <textarea
              #askWords
              matInput
              cdkTextareaAutosize
              maxlength="2000"
              [value]="words()"
              (input)="type(askWords.value)"
            ></textarea>
          </mat-form-field>
          <button matButton="filled" type="submit" [disabled]="!canSend()">Send the question</button>
        </form>
      } @else {
        <button matButton="outlined" type="button" (click)="open(finding().id)">Ask about this</button>
      }
    }
    @if (refusal(); as words) {
      <p class="refusal" role="alert">{{ words }}</p>
    }
  `,
  styles: `
    .talk {
      margin: 8px 0;
      padding: 8px 0 4px 12px;
      border-left: 3px solid var(--mat-sys-outline-variant);
    }

    .answer {
      margin: 8px 0 4px 14px;
    }

    .by,
    .said {
      margin: 0;
    }

    .said {
      max-width: 62ch;
      white-space: pre-wrap;
      overflow-wrap: anywhere;
    }

    .fresh {
      padding: 0 8px;
      border-radius: 9px;
      background: var(--st-deep-water);
      color: #fff;
    }

    form {
      display: grid;
      justify-items: start;
      gap: 8px;
      margin-top: 8px;
    }

    mat-form-field {
      width: 100%;
    }

    .refusal {
      margin: 8px 0 0;
      color: var(--mat-sys-error);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Questions {
  private readonly api = inject(Api);
  private readonly device = inject(DeviceStore);

  readonly finding = input.required<Finding>();
  readonly may = input.required<'ask' | 'answer' | 'look'>();
  /** A question was asked, or answered. */
  readonly said = output<Question>();

  /** What is written to: a question's id, or the finding's for a new question. Text left on this device opens it. */
  protected readonly answering = linkedSignal<string | null>(() => {
    const places = [this.finding().id, ...this.finding().questions.map(({ id }) => id)];
    return places.find((place) => this.keptFor(place) !== '') ?? null;
  });
  protected readonly words = linkedSignal(() => this.keptFor(this.answering()));
  protected readonly refusal = signal<string | null>(null);
  private readonly sending = signal(false);
  protected readonly canSend = computed(() => !this.sending() && this.words().trim() !== '');
  protected readonly shown = computed(() =>
    this.finding().questions.map((question) => ({
      ...question,
      when: sayInstant(question.createdAt),
      answers: question.answers.map((answer) => ({
        ...answer,
        when: sayInstant(answer.createdAt),
        fresh: this.may() === 'ask' && answer.readAt === null,
      })),
    })),
  );
  /** One id until it is sent, so that a question sent twice over a bad line is one question. */
  private id = crypto.randomUUID();

  protected open(place: string): void {
    this.answering.set(place);
  }

  /** Kept on the device until the server has it. */
  protected type(words: string): void {
    this.words.set(words);
    const place = this.answering();
    if (place) this.device.write(`said.${place}`, words);
  }

  protected send(event: Event): void {
    event.preventDefault();
    const place = this.answering();
    if (!place || !this.canSend()) return;
    const call = place === this.finding().id ? askQuestion : answerQuestion;
    this.sending.set(true);
    this.refusal.set(null);
    this.api.call(call, { params: { id: place }, body: { words: this.words(), id: this.id } }).subscribe({
      next: (question) => {
        this.device.write(`said.${place}`, '');
        this.id = crypto.randomUUID();
        this.sending.set(false);
        this.answering.set(null);
        this.said.emit(question);
      },
      error: (error: unknown) => {
        this.sending.set(false);
        this.refusal.set(problemOf(error).detail);
      },
    });
  }

  private keptFor(place: string | null): string {
    const kept = place === null || this.may() === 'look' ? null : this.device.read(`said.${place}`);
    return typeof kept === 'string' ? kept : '';
  }
}
