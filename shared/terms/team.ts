import type { Duty, Role } from '#shared/policy/people.ts'

export const ROLE_LABELS: Record<Role, string> = {
  coordinator: 'Coordinator',
  monitor: 'Monitor',
  analyst: 'Analyst',
}

export const DUTY_LABELS: Record<Duty, string> = {
  bedside: 'Bedside',
  reference: 'Reference',
  siteLead: 'Site lead',
  studyLead: 'Study lead',
  verifyIndex: 'Verifies sensor values',
  verifyReference: 'Verifies reference values',
  oversight: 'Oversight',
}
