import { createRoot } from 'react-dom/client';
import { App } from '#app/app.tsx';
import { applyTheme, printOnPaper } from '#lib/preferences.ts';
import { reloadWhenReplaced } from '#lib/reload-when-replaced.ts';
import './styles/index.css';

applyTheme();
printOnPaper();
reloadWhenReplaced();
createRoot(document.getElementById('root')!).render(<App />);
