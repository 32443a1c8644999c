import type { Body, Feature, Section } from '~/section'
import { useSheetState } from '../../shell/use-sheet'
import { Box } from '../box'
import { CasePanel } from '../cases'
import { MaterialChoice } from '../fields/material-choice'
import { FEATURE_SPECS, LIMIT_SPECS, MATERIAL_SPECS, OBSERVATION_SPECS, RECHARGE_SPECS } from '../fields/specs'
import { freshId } from '../ids'
import { BankParticulars } from '../particulars/bank'
import { DateField } from '../particulars/date-field'
import { newMaterial } from '../particulars/materials'
import { SectionParticulars } from '../particulars/whole'
import { ObjectTable } from './object-table'
import { VertexTable } from './vertex-table'

/** The same section, typed: everything that can be drawn stands here in tables that a keyboard and a screen reader can walk. */
export function TableView() {
  const section = useSheetState((state) => state.live.section)
  const caseId = useSheetState((state) => state.caseId)
  const caseOf = section.cases.find(({ id }) => id === caseId)
  return (
    <div className="table-view">
      {caseOf ? (
        <p className="quiet">
          Values of the case “{caseOf.name ?? caseOf.id}”. Shapes, names and observations are common to all cases.
        </p>
      ) : null}
      <div className="table-columns">
        <Box title="Section">
          <SectionParticulars />
        </Box>
        <Box title="Left bank">
          <BankParticulars side="left" />
        </Box>
        <Box title="Right bank">
          <BankParticulars side="right" />
        </Box>
      </div>
      <div className="table-columns">
        <section className="table-block">
          <VertexTable line="ground" />
        </section>
        <section className="table-block">
          <VertexTable line="base" />
        </section>
      </div>
      <ObjectTable
        caption="Materials"
        list="materials"
        one="Material"
        objects={section.materials}
        specs={MATERIAL_SPECS}
        fresh={() => newMaterial(section.materials)}
      />
      <Bodies section={section} />
      <ObjectTable
        caption="Recharge zones"
        list="recharge"
        one="Recharge zone"
        objects={section.recharge}
        specs={RECHARGE_SPECS}
        fresh={() => ({
          id: freshId('rec', section.recharge),
          from: section.left.x,
          to: section.right.x,
          rate: 0.0008,
        })}
      />
      {FEATURE_KINDS.map(({ kind, caption, one }) => (
        <ObjectTable
          key={kind}
          caption={caption}
          list="features"
          one={one}
          objects={section.features.filter((feature) => feature.kind === kind)}
          specs={FEATURE_SPECS[kind]}
          fresh={() => newFeature(section, kind)}
        />
      ))}
      <ObjectTable
        caption="Observations"
        list="observations"
        one="Observation"
        objects={section.observations}
        specs={OBSERVATION_SPECS}
        extra={{
          label: 'date',
          cell: (object) => (
            <DateField path={`observations.${object.id}.date`} label={`Date of ${object.name ?? object.id}`} />
          ),
        }}
        fresh={() => ({
          id: freshId('obs', section.observations),
          name: `P-${section.observations.length + 1}`,
          x: middleOf(section),
          head: levelOf(section),
        })}
      />
      <ObjectTable
        caption="Limits"
        list="limits"
        one="Limit"
        objects={section.limits}
        specs={LIMIT_SPECS}
        fresh={() => ({
          id: freshId('lim', section.limits),
          name: `Limit ${section.limits.length + 1}`,
          from: middleOf(section),
          to: middleOf(section) + (section.right.x - section.left.x) / 20,
          level: levelOf(section),
          clearance: 0.5,
        })}
      />
      <section className="table-block">
        <CasePanel />
      </section>
    </div>
  )
}

const FEATURE_KINDS: { kind: Feature['kind']; caption: string; one: string }[] = [
  { kind: 'ditch', caption: 'Ditches', one: 'Ditch' },
  { kind: 'drain', caption: 'Drains', one: 'Drain' },
  { kind: 'trench', caption: 'Pumped trenches', one: 'Trench' },
  { kind: 'wall', caption: 'Cut-off walls', one: 'Wall' },
]

/** Somewhere inside where nothing stands yet, to the decimetre. */
function middleOf(section: Section): number {
  const { left, right, features } = section
  const taken = features.map(({ x }) => x)
  for (let part = 2; part < 64; part += 1)
    for (let at = 1; at < part; at += 1) {
      const x = Math.round((left.x + ((right.x - left.x) * at) / part) * 10) / 10
      if (!taken.some((other) => Math.abs(other - x) < 0.5)) return x
    }
  return (left.x + right.x) / 2
}
function levelOf(section: Section): number {
  const ground = section.ground.map(([, z]) => z)
  return Math.round((Math.min(...ground) - 1) * 100) / 100
}

export function newFeature(section: Section, kind: Feature['kind']): Feature {
  const id = freshId(kind, section.features)
  const x = middleOf(section)
  const count = section.features.filter((feature) => feature.kind === kind).length + 1
  if (kind === 'trench') return { id, kind, name: `Trench ${count}`, x, rate: 0.1 }
  if (kind === 'wall') return { id, kind, name: `Wall ${count}`, x, thickness: 0.6, k: 0.001 }
  return {
    id,
    kind,
    name: `${kind === 'ditch' ? 'Ditch' : 'Drain'} ${count}`,
    x,
    level: levelOf(section),
    conductance: null,
  }
}

function Bodies({ section }: { section: Section }) {
  return (
    <>
      <ObjectTable<Body>
        caption="Bodies, a later one lies over an earlier one"
        list="bodies"
        one="Body"
        objects={section.bodies}
        specs={[]}
        extra={{
          label: 'material',
          cell: (body) => (
            <MaterialChoice
              path={`bodies.${body.id}.material`}
              label={`Material of ${body.name ?? body.id}`}
              hideLabel
            />
          ),
        }}
        fresh={(): Body => {
          const x = middleOf(section)
          const z = levelOf(section) - 2
          const half = (section.right.x - section.left.x) / 20
          return {
            id: freshId('body', section.bodies),
            material: section.host,
            outline: [
              [x - half, z],
              [x + half, z],
              [x + half, z + 1],
              [x - half, z + 1],
            ],
          }
        }}
      />
      <div className="table-columns">
        {section.bodies.map((body) => (
          <section className="table-block" key={body.id} aria-label={`Outline of ${body.name ?? body.id}`}>
            <h3>{body.name ?? body.id}</h3>
            <VertexTable line={`bodies.${body.id}`} />
          </section>
        ))}
      </div>
    </>
  )
}
