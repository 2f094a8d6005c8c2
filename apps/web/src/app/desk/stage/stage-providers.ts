import type { Provider } from '@angular/core';
import { ClipFrames } from './clip-frames';
import { StageController } from './stage-controller';

/** What a page with a stage provides, so that its keys and controls share the stage's view and its clip. */
export const stageProviders: Provider[] = [StageController, ClipFrames];
