import './lib/no-eval';
import './styles/app.css';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { router } from './app/router';

// after an update the old page's parts are gone: read the new page, once
window.addEventListener('vite:preloadError', (event) => {
  const last = Number(sessionStorage.getItem('brimline-reloaded') ?? 0);
  if (Date.now() - last < 30_000) return;
  event.preventDefault();
  sessionStorage.setItem('brimline-reloaded', String(Date.now()));
  window.location.reload();
});

const root = document.getElementById('root');
if (!root) throw new Error('The page has no place to draw.');
createRoot(root).render(
  <StrictMode>
    <RouterProvider router={router} />
  </StrictMode>,
);
