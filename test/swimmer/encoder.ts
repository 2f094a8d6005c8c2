import { spawn } from 'node:child_process';
import { once } from 'node:events';

/** Takes raw frames (RGBA, lowest row first) one by one and writes an MP4: H.264 High with B-frames, 60 frames between key frames. */
export interface Encoder {
  readonly take: (pixels: Buffer) => Promise<void>;
  readonly finish: () => Promise<void>;
}

export interface Encoding {
  readonly width: number;
  readonly height: number;
  readonly framesPerSecond: number;
  readonly quality: number;
  readonly target: string;
}

/** Needs ffmpeg with libx264 on the path. */
export function openEncoder({ width, height, framesPerSecond, quality, target }: Encoding): Encoder {
  const x264 = ['-c:v', 'libx264', '-profile:v', 'high', '-preset', 'slow', '-crf', String(quality)];
  const groups = ['-g', '60', '-bf', '2', '-threads', '2', '-pix_fmt', 'yuv420p'];
  const tags = [
    '-color_primaries',
    'bt709',
    '-color_trc',
    'bt709',
    '-colorspace',
    'bt709',
    '-color_range',
    'tv',
  ];
  const input = [
    '-f',
    'rawvideo',
    '-pix_fmt',
    'rgba',
    '-s',
    `${width}x${height}`,
    '-r',
    String(framesPerSecond),
    '-i',
    '-',
  ];
  const output = [
    '-fps_mode',
    'passthrough',
    '-bitexact',
    '-movflags',
    '+faststart',
    '-video_track_timescale',
    String(framesPerSecond * 512),
  ];
  const filter = ['-vf', 'vflip,scale=out_color_matrix=bt709:out_range=tv'];
  const child = spawn(
    'ffmpeg',
    ['-v', 'error', '-y', ...input, ...filter, ...x264, ...groups, ...tags, ...output, target],
    {
      stdio: ['pipe', 'inherit', 'inherit'],
    },
  );
  const ended = once(child, 'close');
  return {
    take: async (pixels) => {
      if (!child.stdin.write(pixels)) await once(child.stdin, 'drain');
    },
    finish: async () => {
      child.stdin.end();
      const [code] = (await ended) as [number | null];
      if (code !== 0) throw new Error(`ffmpeg ended with ${code} while writing ${target}.`);
    },
  };
}
