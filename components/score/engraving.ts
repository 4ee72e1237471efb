import type { GraphicalMeasure, GraphicalStaffEntry, OpenSheetMusicDisplay, StaffLine } from 'opensheetmusicdisplay';
import type { Bar, Score } from '@/lib/score/score';
import { type Anchor, type BarBox, type NoteHead, type SheetGeometry, type SystemBox, tidyAnchors } from './geometry';

/** OpenSheetMusicDisplay measures in staff spaces; ours are engraving pixels, ten to the space. */
const SPACE = 10;
/** A head is engraved around its x; anchors are left edges. */
const HEAD_WIDTH = 12;
/** Room between the lowest thing engraved and our first lane. */
const LANE_GAP = 8;

/**
 * Reads off a rendered sheet where everything stands. `firstBar` is the score's bar that the sheet begins with.
 * Objects of the engraver live only until its next render: nothing of them is kept.
 */
export function readGeometry(osmd: OpenSheetMusicDisplay, score: Score, firstBar: number): SheetGeometry {
  const measures = osmd.GraphicSheet.MeasureList;
  const systems = readSystems(osmd);
  const bars: BarBox[] = [];
  const heads: NoteHead[] = [];
  measures.forEach((staves, place) => {
    const bar = score.bars[firstBar + place];
    const drawn = staves.filter((m) => m?.ParentMusicSystem);
    if (!bar || !drawn[0]) return;
    const system = systemIndex(osmd, drawn[0]);
    bars.push(readBar(drawn, bar, score.ticksPerQuarter, system));
    heads.push(...drawn.flatMap((measure) => readHeads(measure, bar, score.ticksPerQuarter, system)));
  });
  const last = systems.at(-1);
  return { width: 0, height: last ? last.laneTop : 0, systems, bars, heads };
}

function readSystems(osmd: OpenSheetMusicDisplay): SystemBox[] {
  return osmd.GraphicSheet.MusicPages.flatMap((page) => page.MusicSystems).map((system, index) => {
    const lines = system.StaffLines;
    const top = Math.min(...lines.map((line) => line.PositionAndShape.AbsolutePosition.y));
    const lowest = lines.reduce((a, b) => (staffBottom(b) > staffBottom(a) ? b : a));
    const left = system.GraphicalMeasures[0]?.[0]?.PositionAndShape.AbsolutePosition.x ?? 0;
    return {
      index,
      left: left * SPACE,
      right: Math.max(...(system.GraphicalMeasures.at(-1) ?? []).map(rightOf)) * SPACE,
      staffTop: top * SPACE,
      staffBottom: staffBottom(lowest) * SPACE,
      laneTop: Math.max(...lines.map(deepest)) * SPACE + LANE_GAP,
    };
  });
}

function staffBottom(line: StaffLine): number {
  return line.PositionAndShape.AbsolutePosition.y + line.StaffHeight;
}

function deepest(line: StaffLine): number {
  const depth = line.BottomLine.reduce((low, y) => (Number.isFinite(y) ? Math.max(low, y) : low), line.StaffHeight);
  return line.PositionAndShape.AbsolutePosition.y + depth;
}

function rightOf(measure: GraphicalMeasure): number {
  return measure.PositionAndShape.AbsolutePosition.x + measure.PositionAndShape.Size.width;
}

function systemIndex(osmd: OpenSheetMusicDisplay, measure: GraphicalMeasure): number {
  return osmd.GraphicSheet.MusicPages.flatMap((page) => page.MusicSystems).indexOf(measure.ParentMusicSystem);
}

function readBar(drawn: readonly GraphicalMeasure[], bar: Bar, ticksPerQuarter: number, system: number): BarBox {
  const first = drawn[0] as GraphicalMeasure;
  const left = first.PositionAndShape.AbsolutePosition.x;
  const inset = Math.max(...drawn.map((m) => m.beginInstructionsWidth)) + 1;
  const anchors = drawn.flatMap((m) => m.staffEntries.flatMap((e) => readAnchor(e, bar, ticksPerQuarter)));
  const end = bar.start + bar.length;
  return {
    bar: bar.index,
    system,
    left: left * SPACE,
    right: rightOf(first) * SPACE,
    start: bar.start,
    end,
    anchors: tidyAnchors(anchors.filter((a) => a.tick < end), bar.start, (left + inset) * SPACE),
  };
}

/** Whole-bar rests are engraved in the middle of the bar and say nothing about its first beat. */
function readAnchor(entry: GraphicalStaffEntry, bar: Bar, ticksPerQuarter: number): Anchor[] {
  const tick = tickOf(entry, bar, ticksPerQuarter);
  const wholeBarRest = entry.hasOnlyRests() && tick === bar.start && entry.parentMeasure.staffEntries.length === 1;
  if (wholeBarRest) return [];
  const lefts = entry.graphicalVoiceEntries.flatMap((v) => v.notes).map((n) => n.PositionAndShape.AbsolutePosition.x);
  const x = lefts.length > 0 ? Math.min(...lefts) : entry.PositionAndShape.AbsolutePosition.x;
  return [{ tick, x: x * SPACE - HEAD_WIDTH / 2 }];
}

function tickOf(entry: GraphicalStaffEntry, bar: Bar, ticksPerQuarter: number): number {
  return bar.start + Math.round(entry.relInMeasureTimestamp.RealValue * 4 * ticksPerQuarter);
}

function readHeads(measure: GraphicalMeasure, bar: Bar, ticksPerQuarter: number, system: number): NoteHead[] {
  const staff = measure.ParentStaff;
  const part = staff.ParentInstrument;
  const place = { part: part.GetMusicSheet.Instruments.indexOf(part), staff: part.Staves.indexOf(staff) + 1, system };
  return measure.staffEntries.flatMap((entry) => {
    const tick = tickOf(entry, bar, ticksPerQuarter);
    const notes = entry.graphicalVoiceEntries.filter((v) => !v.parentVoiceEntry.IsGrace).flatMap((v) => v.notes);
    const sounding = notes.filter((n) => !n.sourceNote.isRest());
    sounding.sort((a, b) => b.PositionAndShape.AbsolutePosition.y - a.PositionAndShape.AbsolutePosition.y);
    return sounding.map((note, rank) => {
      const { x, y } = note.PositionAndShape.AbsolutePosition;
      return { ...place, tick, rank, x: x * SPACE, y: y * SPACE, width: HEAD_WIDTH };
    });
  });
}
