/** In a Web Worker: the engine of the server on one frame, so that the page stays quick while it works. */
import { createAnalyser } from '@/lib/analysis/analyser';
import { trySections, tryTold, type Tried } from '@/lib/sizing/try-sections';
import type { TryAnswer, TryAsked } from './try-message';

const analyser = createAnalyser();
/** The last frame that was evaluated: another of its results is drawn without working it out again. */
let last: { readonly key: string; readonly tried: Tried } | null = null;

const answerOf = ({ id, frame, settings, tried, show }: TryAsked): TryAnswer => {
  const key = JSON.stringify(tried.map(({ of, taken }) => [of, taken.section.name]));
  try {
    const found = last?.key === key ? last.tried : trySections(analyser, frame, settings, tried);
    if ('unfit' in found) return { id, refused: found.unfit };
    last = { key, tried: found };
    return { id, told: tryTold(found, settings, show) };
  } catch (fault) {
    return { id, refused: `The try met a fault: ${fault instanceof Error ? fault.message : String(fault)}` };
  }
};

self.addEventListener('message', ({ data }: MessageEvent<TryAsked>) => self.postMessage(answerOf(data)));
