/** Shown on every run sheet. Common practice, no source; manual, local codes and licensed staff go first. */
export function Cautions() {
  return (
    <div className="note caution" role="note" aria-label="Safety">
      <svg width="20" height="20" viewBox="0 0 18 18" aria-hidden="true">
        <path d="M9 2L17 16H1Z" fill="var(--caution-mark)" stroke="var(--ink)" strokeWidth="1.2" />
        <path
          d="M9.8 6L7.2 10.4H9.6L8.4 14"
          stroke="var(--surface)"
          strokeWidth="1.3"
          fill="none"
        />
      </svg>
      <div className="grid gap-1">
        <p>
          <b>High voltage and stored charge can kill.</b> After a stop: wait, discharge, earth every
          stage, leave the stick on, then reach in. No fire? Do not open to look. Never bypass an
          interlock; a second person stays within reach.
        </p>
        <p>
          Noise: hearing protection. Wet floor and water on live parts: keep dry. Nitrogen: watch
          the oxygen alarm. Silica dust when drying and sieving: extract or mask. Treat process
          water as what was leached into it.
        </p>
        <p>
          Cragline shows settings and controls nothing. The maker’s manual, the lab’s rules, local
          codes and licensed staff come first.
        </p>
      </div>
    </div>
  );
}
