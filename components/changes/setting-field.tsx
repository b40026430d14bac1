import { Field } from '../ui/field';
import { Segments } from '../ui/segments';

export interface SettingOffered {
  /** Its name in the API. */
  readonly setting: string;
  /** Its name on the sheet. */
  readonly word: string;
  /** Its value now, as typed on the sheet; '' = none is given. */
  readonly typed: string;
  /** Its value now, as people read it. */
  readonly now: string;
  readonly help: string;
  readonly options: readonly string[] | null;
  readonly hint: string | null;
}

interface SettingFieldProps {
  readonly offered: SettingOffered;
  readonly value: string;
  readonly error: string | null;
  readonly onChange: (value: string) => void;
}

/** One setting to choose: what it does, its choices, and what it is now once another is chosen. */
export function SettingField({ offered, value, error, onChange }: SettingFieldProps) {
  const { word, typed, now, help, options, hint } = offered;
  const changed = value !== typed;
  return (
    <div className={`setting-field ${changed ? 'setting-changed' : ''}`}>
      {options === null ? (
        <Field
          className="setting-number"
          label={word}
          value={value}
          placeholder={typed === '' ? now : undefined}
          error={error}
          hint={hint}
          autoComplete="off"
          onChange={(event) => onChange(event.target.value)}
        />
      ) : (
        <div className="setting-choice">
          <div className="field-head">{word}</div>
          <Segments
            label={word}
            options={options.map((option) => ({ value: option, label: option }))}
            value={value}
            onChange={onChange}
          />
          {error && <p className="field-wrong field-error">{error}</p>}
        </div>
      )}
      <p className="setting-help">
        {help}
        {changed && (
          <>
            {' '}
            <span className="setting-now">Now: {now}.</span>{' '}
            <button type="button" className="link" onClick={() => onChange(typed)}>
              Leave {word} as it is
            </button>
          </>
        )}
      </p>
    </div>
  );
}
