'use client';

export interface ProjectTick {
  readonly id: number;
  readonly name: string;
}

interface ProjectTicksProps {
  readonly projects: readonly ProjectTick[];
  readonly chosen: ReadonlySet<number>;
  readonly onChange: (chosen: ReadonlySet<number>) => void;
}

/** Projects to be ticked. */
export function ProjectTicks({ projects, chosen, onChange }: ProjectTicksProps) {
  const toggle = (id: number) => {
    const next = new Set(chosen);
    if (!next.delete(id)) next.add(id);
    onChange(next);
  };
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="field-head">Projects</legend>
      {projects.length === 0 && <p className="field-hint">The office has no project yet.</p>}
      {projects.map(({ id, name }) => (
        <label key={id} className="flex items-center gap-2">
          <input type="checkbox" checked={chosen.has(id)} onChange={() => toggle(id)} />
          {name}
        </label>
      ))}
      <p className="field-hint">Clients see what is issued to their projects. Lead, analysts and checkers see all of them.</p>
    </fieldset>
  );
}
