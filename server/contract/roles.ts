/** Who may use a route. Until accounts come, the one built-in person has every role. */
export const ROLES = ['operator', 'engineer', 'inspector', 'administrator'] as const;
export type Role = (typeof ROLES)[number];
