export { default as BenchShell } from './BenchShell.svelte';
export { default as CounterShell } from './CounterShell.svelte';
export { default as SkipLink } from './SkipLink.svelte';
export { default as ThemeSwitch } from './ThemeSwitch.svelte';
export type { CounterData, RoleName, RootData, ShellData, SpineProduct, WorkspacePlace } from './types';
export { default as DoorShell } from './DoorShell.svelte';
export { default as NewPassword } from './NewPassword.svelte';
