/** What can limit the CG forward: the figure of each limit, and its name, in the order of the choice `control_limit_kind`. */
export const controlLimitKinds = [
  { figure: 'forward_limit_elevator', label: 'elevator travel at the stall' },
  { figure: 'forward_limit_tail_lift', label: 'tail’s greatest lift at the stall' },
  { figure: 'forward_limit_nose_wheel', label: 'nose-wheel lift-off' },
  { figure: 'forward_limit_stick_force', label: 'pull to the stall' },
] as const;

export type ControlLimitKind = (typeof controlLimitKinds)[number];
