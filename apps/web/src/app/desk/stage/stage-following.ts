import { effect, untracked } from '@angular/core';
import type { StageModel } from './stage-model';

/** Keeps clip, frame, playing and tool in step with the Desk. Call in an injection context. */
export function followDesk(model: StageModel): void {
  followClip(model);
  followFrame(model);
  followTask(model);
  followCrosshair(model);
}

function followClip(model: StageModel): void {
  effect(() => {
    const [clipId, timesUs] = [model.desk().clipId(), model.desk().timesUs()];
    untracked(() => {
      model.frames.open(clipId, timesUs);
    });
  });
  effect(() => {
    const [picture, size] = [model.desk().picture(), model.size()];
    untracked(() => {
      model.controller.setSizes(picture, size);
    });
  });
}

function followFrame(model: StageModel): void {
  effect((onCleanup) => {
    const player = model.player();
    onCleanup(() => player?.halt());
  });
  effect(() => {
    const { play, frame, captureRateFactor } = model.desk();
    const direction = play.playing() ? play.direction() : 0;
    // Speeds are the world's: film that plays a quarter as fast as the world moved has to play four times as fast.
    const speed = play.speed() / captureRateFactor();
    const [wanted, player, open] = [frame(), model.player(), model.open()];
    untracked(() => {
      player?.follow(direction, speed, wanted);
      open?.loader.want(wanted);
    });
  });
}

function followTask(model: StageModel): void {
  effect(() => {
    const bench = model.bench();
    bench.taskNow();
    untracked(() => {
      bench.send({ kind: 'task' });
    });
  });
  // What hangs on another frame is let go.
  effect(() => {
    model.desk().frame();
    const bench = model.bench();
    untracked(() => {
      bench.hover(null);
      if (bench.held() && bench.tool().name !== 'panning') bench.send({ kind: 'cancel' });
    });
  });
}

function followCrosshair(model: StageModel): void {
  effect(() => {
    if (model.desk().crosshairMoved()) model.keyboardAims.set(true);
  });
  effect(() => {
    const crosshair = model.crosshair();
    untracked(() => {
      if (crosshair) model.controller.reveal(crosshair);
    });
  });
}
