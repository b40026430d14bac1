export interface SettingShown {
  readonly setting: string;
  readonly value: string;
  /** "Setup B6", "changed on screen by Ana Lyst" … */
  readonly source: string;
  readonly onScreen: boolean;
}

/** Every setting of a revision, its value, and where that comes from. */
export function SettingTable({ settings }: { readonly settings: readonly SettingShown[] }) {
  return (
    <table className="tbl setting-table">
      <caption className="sr-only">Settings of this revision</caption>
      <thead>
        <tr>
          <th scope="col">Setting</th>
          <th scope="col">Value</th>
          <th scope="col">Given by</th>
        </tr>
      </thead>
      <tbody>
        {settings.map(({ setting, value, source, onScreen }) => (
          <tr key={setting}>
            <th scope="row">{setting}</th>
            <td>{value}</td>
            <td className={onScreen ? 'setting-on-screen' : 'setting-source'}>{source}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
