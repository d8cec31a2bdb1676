/** A point of the map to be named. */
export interface Named {
  x: number;
  y: number;
  text: string;
}

export interface PlacedLabel {
  /** Start of the baseline. */
  x: number;
  y: number;
  text: string;
  leader: Segment | null;
}

export interface Segment {
  x1: number;
  y1: number;
  x2: number;
  y2: number;
}

export interface Box {
  left: number;
  top: number;
  right: number;
  bottom: number;
}

/** Sizes in the map's points. A figure font has one width for all characters, so a label's box is exact. */
export interface LabelSizes {
  character: number;
  ascent: number;
  descent: number;
  /** Half the side of the box a pad's mark fills. */
  pad: number;
}

const overlap = (a: Box, b: Box): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

/** Whether a segment meets a box: Liang and Barsky's clipping, which leaves nothing where it doesn't. */
export function crosses(s: Segment, box: Box): boolean {
  const dx = s.x2 - s.x1;
  const dy = s.y2 - s.y1;
  let from = 0;
  let to = 1;
  const edges: [number, number][] = [
    [-dx, s.x1 - box.left],
    [dx, box.right - s.x1],
    [-dy, s.y1 - box.top],
    [dy, box.bottom - s.y1],
  ];
  for (const [p, q] of edges) {
    if (p === 0 && q <= 0) return false;
    if (p < 0) from = Math.max(from, q / p);
    if (p > 0) to = Math.min(to, q / p);
  }
  return from < to;
}

const around = (x: number, y: number, half: number): Box => ({
  left: x - half,
  top: y - half,
  right: x + half,
  bottom: y + half,
});

/** Places to try, nearest first: beside the pad without a leader, then on rings that widen. */
function* trials(
  at: Named,
  width: number,
  sizes: LabelSizes,
): Generator<{ box: Box; leader: Segment | null }> {
  const height = sizes.ascent + sizes.descent;
  const boxAt = (cx: number, cy: number): Box => ({
    left: cx - width / 2,
    top: cy - height / 2,
    right: cx + width / 2,
    bottom: cy + height / 2,
  });
  const dx = sizes.pad + 1.5 + width / 2;
  const dy = sizes.pad + 0.5 + height / 2;
  for (const [sx, sy] of [
    [1, 0],
    [-1, 0],
    [0, -1],
    [0, 1],
    [1, -0.7],
    [1, 0.7],
    [-1, -0.7],
    [-1, 0.7],
  ] as const)
    yield { box: boxAt(at.x + sx * dx, at.y + sy * dy), leader: null };
  for (let ring = 12; ring <= 240; ring += 6) {
    for (let turn = 0; turn < 16; turn++) {
      const angle = (turn * Math.PI) / 8;
      const cx = at.x + Math.cos(angle) * (ring + width / 2);
      const cy = at.y + Math.sin(angle) * (ring + height / 2);
      const box = boxAt(cx, cy);
      const x2 = Math.min(Math.max(at.x, box.left), box.right);
      const y2 = Math.min(Math.max(at.y, box.top), box.bottom);
      yield { box, leader: { x1: at.x, y1: at.y, x2, y2 } };
    }
  }
}

/**
 * Names points so that no label covers another label, a pad or a leader, and all stay inside the frame; a leader runs
 * over other pads only where there is no way between them. Greedy, in the order given: who comes first gets the place beside its pad.
 * @returns one entry a point; null where no free place is left within reach.
 */
export function placeLabels(
  named: readonly Named[],
  pads: readonly { x: number; y: number }[],
  frame: Box,
  sizes: LabelSizes,
): (PlacedLabel | null)[] {
  const padBoxes = pads.map((pad) => around(pad.x, pad.y, sizes.pad));
  const labels: Box[] = [];
  const leaders: Segment[] = [];
  const inside = (box: Box): boolean =>
    box.left >= frame.left && box.right <= frame.right && box.top >= frame.top && box.bottom <= frame.bottom;
  const clear = (box: Box): boolean =>
    !padBoxes.some((pad) => overlap(pad, box)) &&
    !labels.some((label) => overlap(label, box)) &&
    !leaders.some((leader) => crosses(leader, box));
  /** Pads the leader would run across, but for those it starts from. */
  const crossed = (at: Named, leader: Segment): boolean =>
    padBoxes.some((pad) => crosses(leader, pad) && !overlap(pad, around(at.x, at.y, 0.01)));

  return named.map((at) => {
    let last: { box: Box; leader: Segment | null } | null = null;
    for (const trial of trials(at, at.text.length * sizes.character, sizes)) {
      const { box, leader } = trial;
      if (!inside(box) || !clear(box)) continue;
      if (leader && labels.some((label) => crosses(leader, label))) continue;
      last ??= trial;
      if (leader && crossed(at, leader)) continue;
      last = trial;
      break;
    }
    if (last === null) return null;
    labels.push(last.box);
    if (last.leader) leaders.push(last.leader);
    return { x: last.box.left, y: last.box.top + sizes.ascent, text: at.text, leader: last.leader };
  });
}
