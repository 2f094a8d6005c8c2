import type { Mark } from '@stillstroke/contract/marks';
import type { Drawing } from '@stillstroke/contract/stills';
import { openClip } from '../../apps/web/src/app/playback/open-clip';
import { composeFrames, composeStill, encodeStill } from '../../apps/web/src/app/review/stills/compose-still';
import { frameCanvas } from '../../apps/web/src/app/review/stills/frame-canvas';

export interface StillWish {
  /** One or two frames of the clip. */
  readonly frames: readonly number[];
  readonly marks?: readonly Mark[];
  readonly drawings?: readonly Drawing[];
}

/** What tests call in the page. */
export interface StillsPage {
  /** Makes a still as the picture page does; answers the JPEG that would be sent, as base64. */
  make(url: string, wish: StillWish): Promise<string>;
}

declare global {
  interface Window {
    stills: StillsPage;
  }
}

const colours = { arm: { left: '#ffb733', right: '#4ba3db' }, casing: '#10222b', plumb: '#ffffff' };

window.stills = {
  async make(url, { frames, marks = [], drawings = [] }) {
    const source = await openClip({ mediaUrl: url, budgetBytes: 1e7 });
    try {
      const pictures = [];
      for (const frame of frames) {
        const canvas = frameCanvas(await source.frame(frame), source);
        pictures.push({
          canvas,
          marks: marks.filter((mark) => mark.frame === frame),
          rollDeg: 0,
          label: null,
        });
      }
      const still = composeStill(composeFrames(pictures, true, colours), drawings);
      const bytes = new Uint8Array(await (await encodeStill(still)).arrayBuffer());
      return btoa(Array.from(bytes, (byte) => String.fromCharCode(byte)).join(''));
    } finally {
      await source.close();
    }
  },
};
