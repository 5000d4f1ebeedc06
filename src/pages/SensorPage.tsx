import { Navigate, useParams } from 'react-router-dom'
import { SENSOR_METHODS } from '#shared/statistics/sensor/SENSOR_METHODS.ts'
import { statisticsVersion } from '#shared/statistics/statisticsVersion.ts'
import { CAUTIONS, LOCAL_PROTOCOL } from '#shared/terms/cautions.ts'
import { CalibrationPart } from '../features/sensors/CalibrationPart.tsx'
import { ConversionsPart } from '../features/sensors/ConversionsPart.tsx'
import { DetectionPart } from '../features/sensors/DetectionPart.tsx'
import { NoisePart } from '../features/sensors/NoisePart.tsx'
import { SENSOR_PARTS, type SensorPart } from '../features/sensors/sensorParts.ts'
import { TracePart } from '../features/sensors/TracePart.tsx'
import { UncertaintyPart } from '../features/sensors/UncertaintyPart.tsx'
import { useBlanks } from '../features/sensors/useBlanks.ts'
import { useStandards } from '../features/sensors/useStandards.ts'
import { Caution } from '../ui/Caution.tsx'
import { Facts } from '../ui/Facts.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { SegmentedLinks } from '../ui/SegmentedLinks.tsx'
import { Sheet } from '../ui/Sheet.tsx'

/** Calibration, limits, noise, uncertainty and breath traces of a sensor; needs no study and stores nothing. */
export default function SensorPage() {
  const { part: key } = useParams()
  // What was given stays while somebody moves between the parts, and no longer.
  const standards = useStandards()
  const blanks = useBlanks()
  const part = SENSOR_PARTS.find((each) => each.key === key)
  if (!part) return <Navigate to={`/sensor/${SENSOR_PARTS[0].key}`} replace />
  const provenance = [
    `${CAUTIONS.researchUse.title}. ${CAUTIONS.researchUse.text}`,
    ...part.methods.map(
      (method) => `${SENSOR_METHODS[method].name}: ${SENSOR_METHODS[method].source}`,
    ),
    `Computed in the browser with statistics ${statisticsVersion}; not stored`,
  ]
  return (
    <>
      <PageHead
        title="Characterise a sensor"
        sub="Calibration, limits, noise, uncertainty and breath traces. Nothing on this page is stored."
        back={{ to: '/', label: 'Your studies' }}
      />
      <SegmentedLinks
        label="What is worked out"
        items={SENSOR_PARTS.map((each) => ({ to: `/sensor/${each.key}`, label: each.label }))}
      />
      <Sheet margin={<Margin part={part} />}>
        {part.key === 'calibration' && <CalibrationPart work={standards} provenance={provenance} />}
        {part.key === 'detection' && <DetectionPart standards={standards} blanks={blanks} />}
        {part.key === 'noise' && <NoisePart provenance={provenance} />}
        {part.key === 'uncertainty' && <UncertaintyPart />}
        {part.key === 'trace' && <TracePart provenance={provenance} />}
        {part.key === 'conversions' && <ConversionsPart />}
      </Sheet>
    </>
  )
}

function Margin({ part }: { part: SensorPart }) {
  return (
    <>
      <Caution title={CAUTIONS.researchUse.title}>
        {CAUTIONS.researchUse.text} {LOCAL_PROTOCOL}
      </Caution>
      <Facts
        items={[
          ...part.methods.map((method) => ({
            term: SENSOR_METHODS[method].name,
            value: SENSOR_METHODS[method].source,
          })),
          { term: 'Computed', value: `In this browser, statistics ${statisticsVersion}` },
        ]}
      />
      <p>Files are read in this browser and go nowhere. What stands here is gone when you leave.</p>
    </>
  )
}
