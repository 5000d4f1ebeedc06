import { SegmentedLinks } from '../../ui/SegmentedLinks.tsx'

/** The two pages of the Protocol station. */
export function StationParts({ studyId }: { studyId: string }) {
  return (
    <SegmentedLinks
      label="Parts of the protocol"
      items={[
        { to: `/studies/${studyId}/protocol`, label: 'Protocol' },
        { to: `/studies/${studyId}/team`, label: 'Sites and team' },
      ]}
    />
  )
}
