import type { Fault } from '../types.ts';
import type { LessonRehearsal } from './rehearse.ts';

/** A fault in one line, as compilers tell them: editors jump to it. */
export const tellFault = (fault: Fault): string =>
  `${fault.file}:${fault.line}:${fault.column} ${fault.message}${fault.fix ? ` Write: ${fault.fix}` : ''}`;

/** The rehearsal of a lesson as text for the author: worst first, then what a learner will meet. */
export function tellRehearsal(file: string, title: string, rehearsal: LessonRehearsal): string {
  const faults = rehearsal.findings.filter(({ level }) => level === 'fault').length;
  const lines = [`${file}  ${title}: ${faults === 0 ? 'ready' : `${faults} to mend`}`];
  for (const finding of rehearsal.findings) {
    const place = finding.line === undefined ? finding.where : `line ${finding.line}`;
    lines.push(`  ${finding.level === 'fault' ? 'MEND' : 'look'}  ${place}: ${finding.sentence}`);
    if (finding.fix) lines.push(`          Write: ${finding.fix.split('\n')[0]}`);
  }
  for (const { title: bench, aims } of rehearsal.benches) {
    lines.push(`  Bench “${bench}”`);
    for (const aim of aims) lines.push(`    ${aim.id}: ${aim.sentence}`);
  }
  for (const { id, answer, sentence } of rehearsal.predictions)
    lines.push(`  Prediction ${id}: “${answer}” ${sentence}`);
  for (const { id, key, variants } of rehearsal.keys)
    lines.push(`  Key of ${id}: ${key}${variants > 1 ? ` (${variants} variants)` : ''}`);
  lines.push(`  Reading: ${rehearsal.reading.words} words, LIX ${rehearsal.reading.lix}`);
  return lines.join('\n');
}
