import { ChangeDetectionStrategy, Component, computed, input, model } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import type { Drawing, DrawingColour } from '@stillstroke/contract/stills';
import {
  type DrawingKind,
  type DrawingList,
  kindNames,
  pointNames,
  pointsOf,
  sayDrawing,
  withPoint,
} from './drawing-list';
import type { PictureSize } from './still-layout';

/** What is drawn on a still, as a list: added, moved, worded and taken away by keyboard alone. */
@Component({
  selector: 'st-drawn-things',
  imports: [MatButtonModule, MatButtonToggleModule, MatFormFieldModule, MatInputModule, MatSelectModule],
  template: `
    <h2>Draw on it</h2>
    <mat-button-toggle-group
      aria-label="Drag on the picture draws"
      [value]="tool()"
      [hideSingleSelectionIndicator]="true"
    >
      @for (kind of kinds; track kind) {
        <mat-button-toggle [value]="kind" (click)="tool.set(tool() === kind ? null : kind)">{{
          names[kind]
        }}</mat-button-toggle>
      }
    </mat-button-toggle-group>
    <div class="row">
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>Colour</mat-label>
        <mat-select [value]="list().colour()" (valueChange)="paint($event)">
          <mat-option value="white">White</mat-option>
          <mat-option value="yellow">Yellow</mat-option>
          <mat-option value="green">Green</mat-option>
        </mat-select>
      </mat-form-field>
      <button matButton="outlined" type="button" [disabled]="!tool() || list().isFull()" (click)="addHere()">
        Put one in the middle
      </button>
    </div>
    <p class="st-quiet st-small">
      {{
        tool() ? 'Drag on the picture, or put one in the middle and move it below.' : 'Choose what to draw.'
      }}
    </p>
    <ul>
      @for (thing of things(); track $index; let at = $index) {
        <li [class.chosen]="list().chosen() === at">
          <div class="row">
            <button
              matButton
              type="button"
              class="name"
              [attr.aria-expanded]="list().chosen() === at"
              (click)="list().chosen.set(list().chosen() === at ? null : at)"
            >
              {{ thing.name }}
            </button>
            <button matButton type="button" (click)="list().remove(at)">
              Take away<span class="st-visually-hidden">: {{ thing.name }}</span>
            </button>
          </div>
          @if (list().chosen() === at) {
            @if (thing.drawing.kind === 'words') {
              <mat-form-field appearance="outline" subscriptSizing="dynamic">
                <mat-label>Words</mat-label>
                <input
                  #words
                  matInput
                  maxlength="120"
                  [value]="thing.drawing.words"
                  (change)="reword(at, thing.drawing, words.value)"
                />
              </mat-form-field>
            }
            @for (point of thing.points; track point.name; let index = $index) {
              <div class="row point">
                <mat-form-field appearance="outline" subscriptSizing="dynamic">
                  <mat-label>{{ point.name }}, across</mat-label>
                  <input
                    #x
                    matInput
                    type="number"
                    [value]="point.x"
                    (change)="place(at, index, { x: x.valueAsNumber, y: point.y })"
                  />
                </mat-form-field>
                <mat-form-field appearance="outline" subscriptSizing="dynamic">
                  <mat-label>{{ point.name }}, down</mat-label>
                  <input
                    #y
                    matInput
                    type="number"
                    [value]="point.y"
                    (change)="place(at, index, { x: point.x, y: y.valueAsNumber })"
                  />
                </mat-form-field>
              </div>
            }
          }
        </li>
      }
    </ul>
    <div class="row">
      <button matButton type="button" [disabled]="!list().canUndo()" (click)="list().undo()">Undo</button>
      <button matButton type="button" [disabled]="!list().canRedo()" (click)="list().redo()">Redo</button>
    </div>
  `,
  styles: `
    h2 {
      margin: 0 0 8px;
      font-size: 1.125rem;
      font-weight: 600;
    }

    .row {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 8px;
      margin-top: 8px;

      mat-form-field {
        flex: 1 1 90px;
        min-width: 0;
      }
    }

    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }

    li {
      padding: 2px 0 6px;
      border-top: 1px solid var(--st-card-edge);
    }

    .name {
      flex: 1;
      justify-content: start;
      text-align: left;
    }

    p {
      margin: 8px 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DrawnThings {
  readonly list = input.required<DrawingList>();
  readonly size = input.required<PictureSize>();
  readonly tool = model<DrawingKind | null>(null);

  protected readonly kinds = Object.keys(kindNames) as readonly DrawingKind[];
  protected readonly names = kindNames;
  protected readonly things = computed(() =>
    this.list()
      .drawings()
      .map((drawing) => ({
        drawing,
        name: sayDrawing(drawing),
        points: pointsOf(drawing).map((point, at) => ({
          ...point,
          name: capital(pointNames[drawing.kind][at] ?? ''),
        })),
      })),
  );

  protected addHere(): void {
    const tool = this.tool();
    if (tool) this.list().add(tool, this.size());
  }

  /** For what is drawn next, and for what is chosen. */
  protected paint(colour: DrawingColour): void {
    const list = this.list();
    list.colour.set(colour);
    const at = list.chosen();
    const drawing = at === null ? undefined : list.drawings()[at];
    if (at !== null && drawing) list.change(at, { ...drawing, colour });
  }

  protected reword(at: number, drawing: Extract<Drawing, { kind: 'words' }>, words: string): void {
    if (words.trim() !== '') this.list().change(at, { ...drawing, words: words.trim() });
  }

  protected place(at: number, point: number, to: { x: number; y: number }): void {
    const drawing = this.list().drawings()[at];
    if (drawing && Number.isFinite(to.x) && Number.isFinite(to.y))
      this.list().change(at, withPoint(drawing, point, to, this.size()));
  }
}

const capital = (word: string) => word.slice(0, 1).toUpperCase() + word.slice(1);
