import type { DrawingData, DrawingResult } from '@/lib/drawing/drawing-data';
import { resultMethodWords } from '@/lib/drawing/result-method-words';

interface ResultFactsProps {
  readonly data: DrawingData;
  readonly result: DrawingResult;
}

/** One line under the drawing: how the chosen result was found, and what it leaves out. */
export function ResultFacts({ data, result }: ResultFactsProps) {
  return (
    <p className="d-facts" aria-label="How this result was found" role="note">
      <b>{result.name}</b> {resultMethodWords(data, result).join(' · ')}
    </p>
  );
}
