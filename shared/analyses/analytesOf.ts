import type { AnalysisParameters } from '#shared/schemas/analysis.ts'

/** The analytes that an analysis speaks of, each with the field that names it. */
export function analytesOf(parameters: AnalysisParameters): { key: string; field: string }[] {
  switch (parameters.kind) {
    case 'comparison':
      return parameters.compare.design === 'paired'
        ? parameters.compare.markers.map(({ analyteKey: key }, at) => ({
            key,
            field: `compare.markers.${at}.analyteKey`,
          }))
        : [{ key: parameters.compare.marker.analyteKey, field: 'compare.marker.analyteKey' }]
    case 'panel':
      return parameters.analyteKeys.map((key, at) => ({ key, field: `analyteKeys.${at}` }))
    case 'agreement':
    case 'correlation': {
      const { analyteKey, referenceKey } = parameters
      const sensor = { key: analyteKey, field: 'analyteKey' }
      return referenceKey === null
        ? [sensor]
        : [sensor, { key: referenceKey, field: 'referenceKey' }]
    }
    default:
      return [{ key: parameters.analyteKey, field: 'analyteKey' }]
  }
}
