import type { NearbyQuery, NearbyTest } from '#shared/contracts/estimates.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { bearing, destination, geodesicDistance } from '#shared/geodesy/index.ts'
import type { Executor } from '../../db/client.ts'
import { localStart } from '../pumping-tests/start-time.ts'
import { testsInBox, valuesOfTests, type Box } from './nearby.repository.ts'

/** More than a page can show; the answer says when there were more. */
const most = 200

type Row = Awaited<ReturnType<typeof testsInBox>>[number]

function boxAround({ lon, lat, radiusM }: NearbyQuery): Box {
  const reach = (degrees: number) => destination({ lon, lat }, degrees, radiusM)
  const [west, east] = [reach(270).lon, reach(90).lon]
  // A box across the date line would turn inside out: there the distance alone decides.
  const [from, to] = west <= east ? [west, east] : [-180, 180]
  return { southWest: [from, reach(180).lat], northEast: [to, reach(0).lat] }
}

const lonLat = ({ position: [lon, lat] }: Row) => ({ lon, lat })

export async function nearbyTests(executor: Executor, viewer: Viewer, query: NearbyQuery) {
  const place = { lon: query.lon, lat: query.lat }
  const rows = await testsInBox(executor, viewer, boxAround(query), query.unitId)
  const byTest = new Map<number, Row[]>()
  for (const row of rows) byTest.set(row.pumpingTestId, [...(byTest.get(row.pumpingTestId) ?? []), row])
  const near = [...byTest.values()]
    .map((group) => ({ group, distanceM: geodesicDistance(place, lonLat(group[0]!)) }))
    .filter(({ distanceM }) => distanceM <= query.radiusM)
    .sort((a, b) => a.distanceM - b.distanceM)
  const shown = near.slice(0, most)
  const values = await valuesOfTests(
    executor,
    shown.map(({ group }) => group[0]!.pumpingTestId),
  )
  const items = shown.map(({ group, distanceM }): NearbyTest => {
    const [first] = group as [Row]
    return {
      pumpingTestId: first.pumpingTestId,
      wellId: first.wellId,
      wellCode: first.wellCode,
      ...lonLat(first),
      distanceM,
      bearingDeg: bearing(place, lonLat(first)),
      startAt: first.startAt.toISOString(),
      year: Number(localStart(first.startAt, first.zone, 'year')),
      unitNames: group.map(({ unitName }) => unitName),
      values: values.filter(({ pumpingTestId }) => pumpingTestId === first.pumpingTestId).map(valueView),
    }
  })
  return { items, truncated: near.length > shown.length }
}

const valueView = ({
  quantity,
  storageClass,
  evidence,
  method,
  log10Value,
}: Awaited<ReturnType<typeof valuesOfTests>>[number]) => ({
  quantity,
  storageClass,
  evidence,
  method: method as NearbyTest['values'][number]['method'],
  value: 10 ** log10Value,
})
