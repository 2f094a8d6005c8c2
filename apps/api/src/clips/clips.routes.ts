import * as calls from '@stillstroke/contract/clips';
import { Router } from 'express';
import { sendFilm, sendPoster } from '../media/send-film';
import { uploadFilm } from '../media/upload-film';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { liveClip } from '../sessions/live-film';
import { deleteClip, getClip, getClipFrames, restoreClip, setCalibration, updateClip } from './clips.service';
import { setDistance } from './distance.service';

export function clipsRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.uploadClip, ({ user, params, req }) => uploadFilm(context, user, params.id, req));
  mount(router, calls.getClip, ({ user, params }) => getClip(context, user, params.id));
  mount(router, calls.updateClip, ({ user, params, body }) => updateClip(context, user, params.id, body));
  mount(router, calls.deleteClip, ({ user, params }) => deleteClip(context, user, params.id));
  mount(router, calls.restoreClip, ({ user, params }) => restoreClip(context, user, params.id));
  mount(router, calls.getClipFrames, ({ user, params }) => getClipFrames(context, user, params.id));
  mount(router, calls.putCalibration, ({ user, params, body }) =>
    setCalibration(context, user, params.id, body),
  );
  mount(router, calls.putDistance, ({ user, params, body }) => setDistance(context, user, params.id, body));
  mount(router, calls.getClipMedia, ({ user, params, res }) =>
    sendFilm(context.settings, liveClip(context.db, user, params.id).clip, res),
  );
  mount(router, calls.getClipPoster, ({ user, params, res }) =>
    sendPoster(context.settings, liveClip(context.db, user, params.id).clip, res),
  );
  return router;
}
