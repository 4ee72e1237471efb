/**
 * The primitives every page is set with. Import from '@/components/ui'. Colours, type and spacing are tokens of
 * app/globals.css: use `bg-paper|sheet|bench`, `text-ink|ink-soft`, `border-rule|rule-strong`, `text-madder` (needs the
 * eye), `text-verdigris` (settled), `text-ochre` (open) with their `-wash`; `font-book|sans|caps`; `text-micro|small|
 * base|lead|title|display`; and the utilities `caps` (small capitals), `tabular` (figures in columns), `plate` (double
 * hairline), `link`, `measure`, `sheet` (page column). No shadows, no rounded cards, no other colours.
 *
 *  Button, ButtonLink      kind primary | plain | quiet | danger; size normal | small | icon; busy
 *  Field                   label, hint, error round one Input, TextArea or Select (ids are wired by context)
 *  Checkbox, Radio, Choices  rows with labels; a fieldset with its legend
 *  Dialog, DialogActions, Confirm   modal sheet; Confirm for what cannot be undone
 *  Menu, MenuAction, MenuLink, MenuDownload, MenuChoice, MenuRule, MenuHeading
 *  Tabs, Tooltip
 *  Table, Row, Th, SortTh, Td       inside Table: thead/tbody of Row
 *  Announcements, useAnnouncer      announce(text, undo?) and warn(text): on screen and to screen readers
 *  Spinner, Skeleton, SkeletonRows, Progress
 *  EmptyState, ErrorNote, WarningNote, SettledNote
 *  StateMark (STATES), Mark, ShapeIcon    state as shape + word + colour
 *  DateText (UTC), Pagination
 *  Tag, Breadcrumbs, PageHeader, Section, Facts, ThemeSwitch, Wordmark
 */
export { Breadcrumbs, type Crumb } from './breadcrumbs';
export { BUTTON_KINDS, Button, type ButtonKind, ButtonLink, buttonClass } from './button';
export { Checkbox, Choices, Radio } from './checkbox';
export { classNames } from './class-names';
export { DateText } from './date-text';
export { Confirm, Dialog, DialogActions } from './dialog';
export { Field, useFieldIds } from './field';
export { Input, Select, TextArea } from './input';
export { Menu, MenuAction, MenuChoice, MenuDownload, MenuHeading, MenuLink, MenuRule } from './menu';
export { EmptyState, ErrorNote, SettledNote, WarningNote } from './notes';
export { Facts, PageHeader, Section } from './page-header';
export { Pagination } from './pagination';
export { Progress } from './progress';
export { SHAPES, type Shape, ShapeIcon } from './shape';
export { Skeleton, SkeletonRows } from './skeleton';
export { Spinner } from './spinner';
export { Mark, STATES, StateMark, type StateName, TONES, TONE_TEXT, type Tone } from './state-mark';
export { Row, SortTh, Table, Td, Th, type SortDirection } from './table';
export { Tabs } from './tabs';
export { Tag } from './tag';
export { THEMES, type Theme, ThemeSwitch } from './theme-switch';
export { Announcements, useAnnouncer } from './toast';
export { Tooltip } from './tooltip';
export { Wordmark } from './wordmark';
