import type { ExportClip, ExportMark, ExportStroke } from '@stillstroke/contract/export';
import { measureColumns } from '@stillstroke/contract/export-dictionary';
import { measureSchema } from '@stillstroke/contract/measures';
import type { Row } from './csv-text';

/** Rows of the tables that are about one clip. */

export function clipTableRow(sessionId: string, clip: ExportClip): Row {
  const { plumb, distance, jointUncertaintyPx: joint } = clip;
  return {
    clip_id: clip.id,
    session_id: sessionId,
    name: clip.name,
    sha256: clip.sha256,
    view: clip.view,
    travel: clip.travel,
    stroke: clip.stroke,
    capture_rate_factor: clip.captureRateFactor,
    width_px: clip.width,
    height_px: clip.height,
    frame_count: clip.frameCount,
    duration_us: clip.durationUs,
    frame_rate: clip.frameRate,
    plumb_top_x_px: plumb?.top.x ?? null,
    plumb_top_y_px: plumb?.top.y ?? null,
    plumb_bottom_x_px: plumb?.bottom.x ?? null,
    plumb_bottom_y_px: plumb?.bottom.y ?? null,
    distance_m: distance?.metres ?? null,
    distance_u_m: distance?.uncertaintyM ?? null,
    distance_from_frame: distance?.fromFrame ?? null,
    distance_to_frame: distance?.toFrame ?? null,
    joint_u_shoulder_px: joint.shoulder,
    joint_u_elbow_px: joint.elbow,
    joint_u_wrist_px: joint.wrist,
  };
}

const place = (clip: ExportClip, { arm, frame }: Pick<ExportMark, 'arm' | 'frame'>): Row => ({
  clip_id: clip.id,
  arm,
  frame,
  time_us: clip.timesUs[frame] ?? null,
});

export function markRows(clip: ExportClip): Row[] {
  return clip.marks.map((mark) => ({
    ...place(clip, mark),
    shoulder_x_px: mark.shoulder.x,
    shoulder_y_px: mark.shoulder.y,
    elbow_x_px: mark.elbow.x,
    elbow_y_px: mark.elbow.y,
    wrist_x_px: mark.wrist.x,
    wrist_y_px: mark.wrist.y,
  }));
}

export function readingRows(clip: ExportClip): Row[] {
  return clip.marks.map((mark) => ({
    ...place(clip, mark),
    forearm_deg: mark.angles.forearmDeg,
    forearm_u_deg: mark.uncertaintyDeg.forearmDeg,
    upper_arm_deg: mark.angles.upperArmDeg,
    upper_arm_u_deg: mark.uncertaintyDeg.upperArmDeg,
    elbow_deg: mark.angles.elbowDeg,
    elbow_u_deg: mark.uncertaintyDeg.elbowDeg,
    elbow_drop_deg: mark.angles.elbowDropDeg,
    elbow_drop_u_deg: mark.uncertaintyDeg.elbowDropDeg,
    plumb_assumed: mark.plumbAssumed,
  }));
}

export function eventRows(clip: ExportClip): Row[] {
  return clip.strokes.flatMap((stroke) => {
    const chosen = [
      ['entry', stroke.entry, stroke.entrySource],
      ['catch', stroke.catch, stroke.catchSource],
      ['exit', stroke.exit, stroke.exitSource],
      ['next_entry', stroke.nextEntry, stroke.nextEntrySource],
    ] as const;
    return chosen.flatMap(([event, frame, source]) =>
      frame === null ? [] : [{ ...eventRow(clip, stroke, event, frame), source }],
    );
  });
}

function eventRow(clip: ExportClip, { id, arm }: ExportStroke, event: string, frame: number): Row {
  const timeUs = clip.timesUs[frame] ?? null;
  const sinceFirst = timeUs === null ? null : timeUs - (clip.timesUs[0] ?? 0);
  return {
    ...place(clip, { arm, frame }),
    stroke_id: id,
    event,
    world_time_s: sinceFirst === null ? null : (sinceFirst * clip.captureRateFactor) / 1e6,
  };
}

export function strokeRows(clip: ExportClip): Row[] {
  return clip.strokes.map(({ id, arm, breath, figures }) => {
    const measured = measureSchema.options.map((name) => figureCells(name, figures[name]));
    return measured.reduce((row, cells) => ({ ...row, ...cells }), {
      clip_id: clip.id,
      stroke_id: id,
      arm,
      breath,
    });
  });
}

function figureCells(
  name: (typeof measureSchema.options)[number],
  figure: ExportStroke['figures'][string] | undefined,
): Row {
  const columns = measureColumns(name);
  return {
    [columns.value]: figure?.value ?? null,
    [columns.uncertainty]: figure?.uncertainty ?? null,
    [columns.frame]: figure?.frame ?? null,
    [columns.reason]: figure?.reason ?? null,
  };
}
