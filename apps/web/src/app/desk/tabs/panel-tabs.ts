import { ChangeDetectionStrategy, Component, ElementRef, inject, input, model } from '@angular/core';

export interface PanelTab {
  /** Names the panel: its element has the id `panel-<id>`. */
  readonly id: string;
  readonly label: string;
}

/** The row of tabs over the panels. Arrow keys, Home and End move between them; Tab goes on into the panel. */
@Component({
  selector: 'st-panel-tabs',
  template: `
    @for (tab of tabs(); track tab.id) {
      <button
        type="button"
        role="tab"
        [id]="'tab-' + tab.id"
        [attr.aria-controls]="tab.id === chosen() ? 'panel-' + tab.id : null"
        [attr.aria-selected]="tab.id === chosen()"
        [tabindex]="tab.id === chosen() ? 0 : -1"
        (click)="chosen.set(tab.id)"
        (keydown)="move($event)"
      >
        {{ tab.label }}
      </button>
    }
  `,
  styleUrl: './panel-tabs.scss',
  host: { role: 'tablist' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PanelTabs {
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  readonly tabs = input.required<readonly PanelTab[]>();
  readonly chosen = model.required<string>();

  protected move(event: KeyboardEvent): void {
    const tabs = this.tabs();
    const at = tabs.findIndex(({ id }) => id === this.chosen());
    const to = { ArrowLeft: at - 1, ArrowRight: at + 1, Home: 0, End: tabs.length - 1 }[event.key];
    const next = to === undefined ? undefined : tabs[(to + tabs.length) % tabs.length];
    if (!next) return;
    event.preventDefault();
    this.chosen.set(next.id);
    this.host.querySelector<HTMLElement>(`#tab-${next.id}`)?.focus();
  }
}
