export { pageShortcuts, Shortcuts, type Shortcut } from './shortcuts';
