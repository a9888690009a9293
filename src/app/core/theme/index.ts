export { THEMES, ThemeChoice, type Theme } from './theme';
