import type { SVGProps } from 'react';
import { cx } from './class-names';

type IconProps = SVGProps<SVGSVGElement>;

function Icon({ className, children, ...rest }: IconProps) {
  return (
    <svg
      viewBox="0 0 16 16"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.5"
      aria-hidden="true"
      {...rest}
      className={cx('size-4 flex-none', className)}
    >
      {children}
    </svg>
  );
}

export const CrossIcon = (props: IconProps) => (
  <Icon {...props}>
    <path d="M3.5 3.5 12.5 12.5 M12.5 3.5 3.5 12.5" />
  </Icon>
);
export const ChevronDownIcon = (props: IconProps) => (
  <Icon {...props}>
    <path d="M3.5 6 8 10.5 12.5 6" />
  </Icon>
);
export const ChevronRightIcon = (props: IconProps) => (
  <Icon {...props}>
    <path d="M6 3.5 10.5 8 6 12.5" />
  </Icon>
);
export const PlusIcon = (props: IconProps) => (
  <Icon {...props}>
    <path d="M8 3 V13 M3 8 H13" />
  </Icon>
);
export const ArrowUpIcon = (props: IconProps) => (
  <Icon {...props}>
    <path d="M8 13 V3 M4 7 8 3 12 7" />
  </Icon>
);
export const ArrowDownIcon = (props: IconProps) => (
  <Icon {...props}>
    <path d="M8 3 V13 M4 9 8 13 12 9" />
  </Icon>
);
export const MenuIcon = (props: IconProps) => (
  <Icon {...props}>
    <path d="M2 4.5 H14 M2 8 H14 M2 11.5 H14" />
  </Icon>
);
