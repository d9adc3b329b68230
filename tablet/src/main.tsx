import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { App } from '#app/app.tsx';
import { startAppUpdates } from '#app/app-updates.ts';
import { startLeftOvers } from '#app/left-overs.ts';
import { startSession } from '#lib/session.ts';
import { startTheme } from '#lib/theme.ts';
import '#app/styles.css';

startTheme();
startSession();
startAppUpdates();
startLeftOvers();

const root = document.getElementById('root');
if (root) {
  createRoot(root).render(
    <StrictMode>
      <App />
    </StrictMode>,
  );
}
