import { workshop } from '../workshop.ts';

/** What every page says at its foot: what this is, and who decides. */
export function Cautions() {
  const shop = workshop.value;
  return (
    <footer class="cautions">
      {shop?.practice && <p class="practice">{shop.sentence}</p>}
      <p>
        Dwellbook compares logged readings with a written cycle. It is no release of a part, and says nothing about
        whether a vessel is safe to open. The governing specification, the material maker, local code and licensed
        practice decide.
      </p>
      {shop && (
        <p>
          {shop.name} · written in the name of {shop.actor.name} · times in {shop.zone} · version {shop.version}
        </p>
      )}
    </footer>
  );
}
