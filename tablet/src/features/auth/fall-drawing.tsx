/** A day as weather: the water climbs, holds, and falls through its levels. A drawing, not data. */
export function FallDrawing({ className }: { className?: string }) {
  return (
    <svg
      viewBox="0 0 720 800"
      preserveAspectRatio="xMidYMid slice"
      className={className}
      aria-hidden="true"
      fill="none"
    >
      <g stroke="var(--edge)" strokeWidth="2" strokeDasharray="10 10">
        <path d="M0 250H720M0 470H400M506 470H720M0 650H720" />
      </g>
      <g fontSize="26" fill="var(--soft)" fontFamily="inherit">
        <text x="650" y="236" textAnchor="end">
          tea in
        </text>
        <text x="650" y="456" textAnchor="end">
          hops in
        </text>
        <text x="250" y="690">
          into the keg
        </text>
      </g>
      <path d="M-20 800C60 660 110 340 196 240" stroke="var(--copper-line)" strokeWidth="12" />
      <path d="M192 244C210 222 240 226 276 228" stroke="var(--leaf-line)" strokeWidth="12" />
      <path d="M274 228C330 230 384 362 453 470C516 568 590 640 740 684" stroke="var(--tarn-line)" strokeWidth="12" />
      <path d="M453 438l32 32-32 32-32-32z" fill="var(--ground)" stroke="var(--text)" strokeWidth="6" />
    </svg>
  );
}
