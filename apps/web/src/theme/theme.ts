/** The Mantine theme: our tokens, type and shapes behind Mantine's own components. */
import {
  ActionIcon,
  Anchor,
  Badge,
  Button,
  Checkbox,
  type CSSVariablesResolver,
  createTheme,
  Input,
  InputWrapper,
  type MantineColorsTuple,
  Menu,
  Modal,
  NavLink,
  Notification,
  NumberInput,
  Paper,
  Popover,
  Radio,
  SegmentedControl,
  Switch,
  Table,
  Tabs,
  Tooltip,
} from '@mantine/core';
import parts from './parts.module.css';
import { cssVariables, DARK, LIGHT, type Tokens } from './tokens.js';

const FONT = "'Manrope Variable', Manrope, system-ui, sans-serif";

/** Mantine wants ten shades of each colour; only the marked ones are used, the rest keep its own parts in tune. */
const DEEP: MantineColorsTuple = [
  '#E9F2F3',
  '#D3E6E0',
  '#A9CDD0',
  '#7FB5AE',
  '#68B4C1',
  '#2F7F8F',
  '#0E5A6B',
  '#0B4A58',
  '#1D6271',
  '#14303A',
];
const BRASS: MantineColorsTuple = [
  '#FBF5E6',
  '#F4E8CF',
  '#E9D2A3',
  '#DDB064',
  '#D2A04A',
  '#C59236',
  '#B9862F',
  '#8F651C',
  '#74500F',
  '#4A3309',
];
const BUOY: MantineColorsTuple = [
  '#FCEFEA',
  '#F7E0D8',
  '#F1C1B3',
  '#EC8B75',
  '#E0745C',
  '#D25A42',
  '#C8452D',
  '#A03019',
  '#7D2413',
  '#5A190D',
];
const KELP: MantineColorsTuple = [
  '#F0F5EC',
  '#E0EBD8',
  '#C3D9B7',
  '#97C188',
  '#86B277',
  '#669857',
  '#4C7A3F',
  '#3A622F',
  '#2C4B24',
  '#1D3318',
];

/** Give this to `MantineProvider` as `theme`. */
export const theme = createTheme({
  colors: { deep: DEEP, brass: BRASS, buoy: BUOY, kelp: KELP },
  primaryColor: 'deep',
  primaryShade: { light: 6, dark: 8 },
  fontFamily: FONT,
  fontFamilyMonospace: FONT,
  headings: {
    fontFamily: FONT,
    fontWeight: '700',
    sizes: {
      h1: { fontSize: '1.5rem', lineHeight: '1.2', fontWeight: '700' },
      h2: { fontSize: '1.0625rem', lineHeight: '1.3', fontWeight: '800' },
      h3: { fontSize: '0.9375rem', lineHeight: '1.4', fontWeight: '800' },
      h4: { fontSize: '0.8125rem', lineHeight: '1.45', fontWeight: '700' },
    },
  },
  fontSizes: { xs: '0.75rem', sm: '0.8125rem', md: '0.9375rem', lg: '1.0625rem', xl: '1.5rem' },
  lineHeights: { xs: '1.35', sm: '1.45', md: '1.4', lg: '1.3', xl: '1.2' },
  spacing: { xs: '0.5rem', sm: '0.75rem', md: '1rem', lg: '1.5rem', xl: '2rem' },
  radius: { xs: '3px', sm: '4px', md: '6px', lg: '10px', xl: '16px' },
  defaultRadius: 'md',
  shadows: {
    xs: 'var(--sk-shadow)',
    sm: 'var(--sk-shadow)',
    md: 'var(--sk-shadow)',
    lg: 'var(--sk-shadow)',
    xl: 'var(--sk-shadow)',
  },
  focusRing: 'auto',
  focusClassName: 'sk-focus',
  respectReducedMotion: true,
  cursorType: 'pointer',
  components: {
    Button: Button.extend({ classNames: { root: parts.button ?? '' }, defaultProps: { size: 'sm' } }),
    ActionIcon: ActionIcon.extend({ defaultProps: { variant: 'subtle' } }),
    Anchor: Anchor.extend({ classNames: { root: parts.anchor ?? '' }, defaultProps: { inherit: true } }),
    Input: Input.extend({ classNames: { input: parts.input ?? '' }, defaultProps: { size: 'sm' } }),
    InputWrapper: InputWrapper.extend({
      classNames: { label: parts.label ?? '', description: parts.note ?? '', error: parts.error ?? '' },
      defaultProps: { inputWrapperOrder: ['label', 'description', 'input', 'error'] },
    }),
    NumberInput: NumberInput.extend({ defaultProps: { hideControls: true } }),
    Checkbox: Checkbox.extend({ classNames: { input: parts.tick ?? '' }, defaultProps: { size: 'sm' } }),
    Radio: Radio.extend({ classNames: { radio: parts.tick ?? '' }, defaultProps: { size: 'sm' } }),
    Switch: Switch.extend({ classNames: { track: parts.track ?? '' } }),
    SegmentedControl: SegmentedControl.extend({
      classNames: {
        root: parts.segments ?? '',
        control: parts.segmentControl ?? '',
        label: parts.segment ?? '',
        indicator: parts.segmentIndicator ?? '',
      },
      defaultProps: { withItemsBorders: false },
    }),
    Table: Table.extend({
      classNames: { table: parts.table ?? '', th: parts.th ?? '', td: parts.td ?? '', tr: parts.tr ?? '' },
    }),
    Tabs: Tabs.extend({ classNames: { list: parts.tabs ?? '', tab: parts.tab ?? '' } }),
    Badge: Badge.extend({ classNames: { root: parts.badge ?? '' }, defaultProps: { radius: 'sm' } }),
    Paper: Paper.extend({ classNames: { root: parts.paper ?? '' }, defaultProps: { radius: 'lg' } }),
    Modal: Modal.extend({
      classNames: { title: parts.modalTitle ?? '', content: parts.paper ?? '', header: parts.paper ?? '' },
    }),
    Menu: Menu.extend({
      classNames: { dropdown: parts.dropdown ?? '', item: parts.menuItem ?? '', label: parts.note ?? '' },
    }),
    Popover: Popover.extend({ classNames: { dropdown: parts.dropdown ?? '' } }),
    Tooltip: Tooltip.extend({ classNames: { tooltip: parts.tooltip ?? '' }, defaultProps: { openDelay: 250 } }),
    Notification: Notification.extend({ classNames: { root: parts.notification ?? '' } }),
    NavLink: NavLink.extend({ classNames: { root: parts.navLink ?? '' } }),
  },
});

/** Give this to `MantineProvider` as `cssVariablesResolver`. */
export const cssVariablesResolver: CSSVariablesResolver = () => ({
  variables: {
    '--mantine-heading-text-wrap': 'balance',
    '--mantine-line-height': '1.45',
  },
  light: { ...cssVariables(LIGHT), ...schemeVariables(LIGHT), '--sk-shadow': shadow('20 48 58') },
  dark: { ...cssVariables(DARK), ...schemeVariables(DARK), '--sk-shadow': 'none' },
});

function shadow(rgb: string): string {
  return `0 1px 0 rgb(${rgb} / 4%), 0 6px 18px -10px rgb(${rgb} / 18%)`;
}

/** Mantine's own variables in our colours, so that every part of it that we don't style still fits. */
function schemeVariables(tokens: Tokens): Record<string, string> {
  return {
    '--mantine-color-body': tokens.paper,
    '--mantine-color-text': tokens.ink,
    '--mantine-color-bright': tokens.ink,
    '--mantine-color-dimmed': tokens.ink2,
    '--mantine-color-placeholder': tokens.ink3,
    '--mantine-color-anchor': tokens.deep,
    '--mantine-color-error': tokens.buoyInk,
    '--mantine-color-success': tokens.kelpInk,
    '--mantine-color-default': tokens.sheet,
    '--mantine-color-default-hover': tokens.sea,
    '--mantine-color-default-color': tokens.ink,
    '--mantine-color-default-border': tokens.edge,
    '--mantine-color-disabled': 'transparent',
    '--mantine-color-disabled-color': tokens.ink3,
    '--mantine-color-disabled-border': tokens.edge,
    '--mantine-primary-color-filled': tokens.button,
    '--mantine-primary-color-filled-hover': tokens.buttonHover,
    '--mantine-primary-color-contrast': tokens.buttonInk,
    '--mantine-primary-color-light': tokens.shoalWash,
    '--mantine-primary-color-light-hover': tokens.shoalWash,
    '--mantine-primary-color-light-color': tokens.ink,
    '--mantine-color-deep-filled': tokens.button,
    '--mantine-color-deep-filled-hover': tokens.buttonHover,
    '--mantine-color-deep-light': tokens.shoalWash,
    '--mantine-color-deep-light-color': tokens.ink,
    '--mantine-color-deep-outline': tokens.deep,
    '--mantine-color-deep-text': tokens.deep,
    '--mantine-color-buoy-outline': tokens.buoyInk,
    '--mantine-color-buoy-text': tokens.buoyInk,
    '--mantine-color-buoy-light': tokens.buoyWash,
    '--mantine-color-buoy-light-color': tokens.buoyInk,
    '--mantine-color-brass-light': tokens.brassWash,
    '--mantine-color-brass-light-color': tokens.brassInk,
    '--mantine-color-brass-text': tokens.brassInk,
    '--mantine-color-kelp-light': tokens.kelpWash,
    '--mantine-color-kelp-light-color': tokens.kelpInk,
    '--mantine-color-kelp-text': tokens.kelpInk,
  };
}
