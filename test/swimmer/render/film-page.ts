import { type FilmPlan, Scene } from './scene';

declare global {
  interface Window {
    /** Draws frames one by one and posts each as raw RGBA (lowest row first) to `address`. */
    film: (plan: FilmPlan, frames: readonly number[], address: string) => Promise<void>;
  }
}

window.film = async (plan, frames, address) => {
  const scene = new Scene(document.createElement('canvas'), plan);
  for (const frame of frames) {
    const answer = await fetch(address, { method: 'POST', body: new Blob([scene.draw(frame) as BlobPart]) });
    if (!answer.ok) throw new Error(`Frame ${frame} was not taken: ${answer.status}.`);
  }
};
