import type { StudyInput } from '#shared/schemas/study.ts'
import { aKey } from './api.ts'
import { inventedProtocol } from './makers.ts'

/** What a study lead sends to make a study of earlier data; invented. */
export function aStudyInput(changes: Partial<StudyInput> = {}): StudyInput {
  const id = aKey()
  return {
    id,
    kind: 'earlierData',
    code: `NEW-${id.slice(0, 8).toUpperCase()}`,
    title: 'Invented study of earlier data',
    sites: [
      { name: 'North ward', prefix: 'N04', plannedSubjects: 60 },
      { name: 'South clinic', prefix: 'S02', plannedSubjects: null },
    ],
    analytes: [
      { key: 'ammonia', name: 'Ammonia', unit: '[ppb]' },
      { key: 'marker_x', name: 'Marker X', unit: 'ug/L' },
    ],
    document: inventedProtocol,
    ...changes,
  }
}
