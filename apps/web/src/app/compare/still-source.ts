import { endpointUrl } from '../core/api/endpoint-url';
import { getClipMedia } from '@stillstroke/contract/clips';
import { openClip } from '../playback/open-clip';
import type { FrameAnswer, FrameSource } from '../playback/frame-source';

/** Memory for the pictures of one clip on this page; stills need few. */
const budgetBytes = 96 * 1024 * 1024;

/** Opens each clip of a comparison once and hands out single frames of it; both stills of one clip share its source. */
export class StillSource {
  private readonly opened = new Map<string, Promise<FrameSource>>();

  /** The frame, or its refusal. `keep` lets two stills of one clip wait at the same time. */
  async frame(
    clipId: string,
    frame: number,
    signal: AbortSignal,
  ): Promise<{ answer: FrameAnswer; source: FrameSource }> {
    const source = await this.open(clipId);
    return { answer: await source.frame(frame, { signal, keep: true }), source };
  }

  async timestampsUs(clipId: string): Promise<readonly number[]> {
    return (await this.open(clipId)).index.timestampsUs;
  }

  close(): void {
    for (const source of this.opened.values()) source.then((open) => open.close()).catch(() => undefined);
    this.opened.clear();
  }

  private open(clipId: string): Promise<FrameSource> {
    const known = this.opened.get(clipId);
    if (known) return known;
    const opening = openClip({ mediaUrl: endpointUrl(getClipMedia, { id: clipId }), budgetBytes });
    this.opened.set(clipId, opening);
    // A clip that failed to open may be asked for again.
    opening.catch(() => this.opened.delete(clipId));
    return opening;
  }
}
