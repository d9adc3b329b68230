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
        <path d="M0 250h252M292 250h428M0 470h432M474 470h246M0 650h596M640 650h80" />
      </g>
      <g fontSize="26" fill="var(--soft)" fontFamily="inherit">
        <text x="700" y="238" textAnchor="end">
          tea in
        </text>
        <text x="700" y="458" textAnchor="end">
          hops in
        </text>
        <text x="24" y="638">
          into the keg
        </text>
      </g>
      <path d="M-20 780C60 640 110 330 190 240" stroke="var(--copper-line)" strokeWidth="12" />
      <path d="M190 240C205 224 240 226 272 228" stroke="var(--leaf-line)" strokeWidth="12" />
      <path d="M272 228C330 232 380 360 452 468C520 570 590 640 740 680" stroke="var(--tarn-line)" strokeWidth="12" />
      <path d="M453 440l30 30-30 30-30-30z" fill="var(--ground)" stroke="var(--text)" strokeWidth="6" />
    </svg>
  );
}
