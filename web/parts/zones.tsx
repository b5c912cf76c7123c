/** Zones of the IANA list, for fields that name `zones` as their list. */
export function Zones() {
  return (
    <datalist id="zones">
      {Intl.supportedValuesOf('timeZone').map((name) => (
        <option key={name} value={name} />
      ))}
    </datalist>
  );
}
