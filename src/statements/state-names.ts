export const stateNames = {
  draft: 'Draft',
  submitted: 'With the safety officer',
  issued: 'In force',
  withdrawn: 'Withdrawn',
} as const;
