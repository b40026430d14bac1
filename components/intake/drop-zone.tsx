'use client';
import { useId, useRef, useState, type DragEvent } from 'react';
import { Mark } from '../ui/mark';

interface DropZoneProps {
  readonly onFiles: (files: readonly File[]) => void;
  /** "sending saltmere_frames.xlsx, 41 %": what is under way; the zone takes nothing then. */
  readonly busy?: string | null;
  /** 0–1, for the rail. */
  readonly progress?: number | null;
  readonly error?: string | null;
  readonly templateHref?: string;
  /** Name of the form field, where the zone stands in a form that works without script. */
  readonly name?: string;
}

/** Where sheets are dropped, or chosen by keyboard: several files at once, one batch. */
export function DropZone({ onFiles, busy, progress, error, templateHref, name = 'files' }: DropZoneProps) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    if (!busy && event.dataTransfer.files.length > 0) onFiles([...event.dataTransfer.files]);
  };
  return (
    <div
      className={`drop-zone ${over ? 'drop-over' : ''}`}
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
    >
      <Mark size={56} strokes={busy ? 4 : 2} />
      <div>
        <h2>{busy ? 'Bringing sheets in' : 'Drop workbooks or CSV files here'}</h2>
        {busy ? (
          <p role="status">{busy}</p>
        ) : (
          <p id={`${id}-help`}>
            One workbook (.xlsx), several .csv files (file name = sheet name), or a .zip of them: they become one batch. Up to 25
            MB and 20,000 frames. Every cell that can’t be read is named.
          </p>
        )}
        {typeof progress === 'number' && (
          <div
            className="rail"
            role="progressbar"
            aria-valuemin={0}
            aria-valuemax={100}
            aria-valuenow={Math.round(progress * 100)}
            aria-label="sent"
          >
            <span style={{ width: `${progress * 100}%` }} />
          </div>
        )}
        {error && (
          <p className="field-error" role="alert" id={`${id}-error`}>
            {error}
          </p>
        )}
        {!busy && (
          <p className="drop-acts">
            <input
              ref={input}
              id={id}
              className="sr-only drop-input"
              type="file"
              name={name}
              multiple
              accept=".xlsx,.csv,.zip"
              aria-describedby={`${id}-help`}
              onChange={(event) => {
                const files = [...(event.target.files ?? [])];
                event.target.value = '';
                if (files.length > 0) onFiles(files);
              }}
            />
            <label htmlFor={id} className="btn btn-filled">
              Choose files
            </label>
            {templateHref && (
              <a className="link" href={templateHref} download>
                An empty template with notes
              </a>
            )}
          </p>
        )}
      </div>
    </div>
  );
}
