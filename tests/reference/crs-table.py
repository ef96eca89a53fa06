"""Makes shared/geodesy/crs-table.json and tests/reference/crs-points.json from PROJ's database.

Run: /usr/bin/python3 tests/reference/crs-table.py   (Debian packages proj-bin, proj-data; Node with proj4 installed)

For every system of crs-families.json PROJ lists its operations to WGS 84. Those that need a grid file are left out,
because neither the browser nor the server carries grids; of the others a smallest set that covers the area of use is
kept, with the accuracy that the EPSG registry states. The reference points come from PROJ (`cct`) running the very
pipeline of each operation at the centre and the corners of its area; `cs2cs` then runs the plain EPSG codes with
PROJ's own choice of operation, and the distance between the two is kept beside them. A system whose proj4js result
differs from PROJ by more than a centimetre is refused, by name.
"""
import concurrent.futures, hashlib, json, math, pathlib, re, sqlite3, subprocess, sys

HERE = pathlib.Path(__file__).resolve().parent
ROOT = HERE.parents[1]
FAMILIES = json.loads((HERE / 'crs-families.json').read_text())
DATABASE = '/usr/share/proj/proj.db'
# proj4js reads +datum=NAD27 as a grid list and knows only some ellipsoid names: ellipsoids are spelt out.
# At most so many operations for single countries are kept beside those that reach the whole area.
FINER = 6
DATUM_ELLIPSOID = {'WGS84': 'WGS84', 'NAD83': 'GRS80', 'NAD27': 'clrk66', 'potsdam': 'bessel', 'OSGB36': 'airy'}


def run(args, text=None):
    return subprocess.run(args, input=text, capture_output=True, text=True).stdout


def systems():
    db = sqlite3.connect(DATABASE)
    extent = """select x.name, x.west_lon, x.south_lat, x.east_lon, x.north_lat from usage u
                join extent x on x.auth_name = u.extent_auth_name and x.code = u.extent_code
                where u.object_auth_name = 'EPSG' and u.object_table_name = ? and u.object_code = ? limit 1"""
    rows = {}
    for pattern in FAMILIES['projected']:
        found = db.execute("""select code, name from projected_crs
                              where auth_name = 'EPSG' and deprecated = 0 and name like ?""", (pattern,)).fetchall()
        rows.update({int(code): ('projected_crs', name) for code, name in found})
    for pattern in FAMILIES['except']:
        for code, in db.execute("select code from projected_crs where auth_name = 'EPSG' and name like ?", (pattern,)):
            rows.pop(int(code), None)
    for code in FAMILIES['geographic']:
        found = db.execute("""select name from geodetic_crs where auth_name = 'EPSG' and code = ?
                              and type = 'geographic 2D' and deprecated = 0""", (code,)).fetchone()
        if found:
            rows[code] = ('geodetic_crs', found[0])
    for code, (table, name) in sorted(rows.items()):
        area = db.execute(extent, (table, code)).fetchone()
        text = re.sub(r' - (by country|SPCS|onshore and offshore|onshore)(?= |$)|^World - ', '', area[0])
        yield {'code': code, 'name': name, 'area': text, 'bbox': list(area[1:])}


def short(word):
    """Ten decimals of a degree are a hundredth of a millimetre."""
    key, _, value = word.partition('=')
    return f'{key}={float(value):.10f}'.rstrip('0') if re.fullmatch(r'-?\d+\.\d{11,}', value) and key != 'k' else word


def definition(code, text):
    """The projection part for proj4js, with the ellipsoid named and no datum shift; `proj=`, plus signs, metres and axes left out."""
    if code == 3857:
        # A sphere's formulas on the ellipsoid's coordinates: proj4js must not shift the datum.
        return 'merc a=6378137 b=6378137 nadgrids=@null'
    words = []
    for word in text.split():
        key, _, value = word.partition('=')
        if key in ('+no_defs', '+type', '+towgs84', '+nadgrids', '+wktext'):
            continue
        word = f'+ellps={DATUM_ELLIPSOID[value]}' if key == '+datum' else word
        granted = ('+lat_0=0', '+x_0=0', '+y_0=0', '+k=1') if '+proj=tmerc' in text else ()
        if word not in ('+units=m', '+axis=wsu', *granted):
            words.append(short(word.removeprefix('+').removeprefix('proj=')))
    return ' '.join(words)


def described(code):
    """The PROJ string of a system and the directions of its axes."""
    text = run(['projinfo', '-o', 'PROJ,PROJJSON', '--single-line', f'EPSG:{code}'])
    string = re.search(r'PROJ\.4 string:\n(.*)', text) or re.search(r'PROJ string:\n(.*)', text)
    listed = json.loads(text[text.index('{'):])['coordinate_system']['axis']
    return string[1].strip(), ''.join(axis['direction'][0] for axis in listed)


def steps(pipeline):
    return [step.split() for step in pipeline.replace('\n', ' ').split('+step')[1:]]


def is_swap(step):
    return any(word == '+proj=axisswap' for word in step)


def native(pipeline):
    """The pipeline between (east, north) in the system's unit and (longitude, latitude) in degrees."""
    parts = steps(pipeline) or [pipeline.split()]
    if is_swap(parts[0]) and '+order=2,1' in parts[0]:
        parts = parts[1:]
    if parts and is_swap(parts[-1]):
        parts = parts[:-1]
    return '+proj=pipeline ' + ' '.join('+step ' + ' '.join(part) for part in parts)


def shift(pipeline):
    """towgs84 parameters of a pipeline, or None when it holds anything but geocentric shifts."""
    total = None
    for step in steps(pipeline):
        words = dict(word.lstrip('+').partition('=')[::2] for word in step)
        if words.get('proj') in ('hgridshift', 'molobadekas', 'deformation', 'gridshift', 'xyzgridshift', 'geogoffset', 'tinshift'):
            return None
        if words.get('proj') != 'helmert':
            continue
        if set(words) - {'proj', 'x', 'y', 'z', 'rx', 'ry', 'rz', 's', 'convention', 'inv'}:
            return None
        sign = -1 if words.get('convention') == 'coordinate_frame' else 1
        row = [float(words.get(k, 0)) for k in 'xyz'] + [sign * float(words.get(k, 0)) for k in ('rx', 'ry', 'rz')]
        row.append(float(words.get('s', 0)))
        if 'inv' in words:
            row = [-value for value in row]
        if total and any(row[3:]) and any(total[3:]):
            return None
        total = [a + b for a, b in zip(total, row)] if total else row
    return total or [0.0] * 7


def box(value):
    return [value['west_longitude'], value['south_latitude'], value['east_longitude'], value['north_latitude']]


def operations(system):
    """Every operation to WGS 84 in PROJ's own order, with accuracy, area, grid need, shift and pipeline."""
    text = run(['projinfo', '-s', f"EPSG:{system['code']}", '-t', 'EPSG:4326', '--spatial-test', 'intersects',
                '--grid-check', 'none', '-o', 'PROJ,PROJJSON'])
    for part in text.split('Operation No.')[1:]:
        pipeline = re.search(r'PROJ string:\n(.*?)\n\n', part, re.S)
        found = re.search(r'PROJJSON:\n(\{.*?\n\})', part, re.S)
        if not pipeline or not found or 'Ballpark' in part.split('\n')[2]:
            continue
        data = json.loads(found[1])
        accuracy = re.search(r', ([\d.]+) m, ', part.split('\n')[2])
        if not accuracy:
            continue
        inner = [s for s in data.get('steps', [data]) if s['type'] == 'Transformation']
        if not inner:
            yield {**identity(system), 'pipeline': native(pipeline[1])}
            continue
        names = [s['name'] for s in inner]
        ids = [f"{s['id']['authority']}:{s['id']['code']}" for s in inner if s.get('id')]
        ids = [i.replace('INVERSE(EPSG)', 'EPSG').replace('DERIVED_FROM(EPSG)', 'EPSG') for i in ids]
        # A national grid shift that PROJ names by the file alone still needs that file.
        needs_grid = '+grids=' in pipeline[1] or 'grid missing' in part or '+file=' in pipeline[1]
        # Wells stand on land, and an operation for the sea beside it often has the wider box.
        if SEA.search(data.get('area', '')) and not LAND.search(data.get('area', '')):
            continue
        if float(accuracy[1]) >= 100 or set(ids) & set(FAMILIES['operationsExcept']):
            continue
        yield {'name': ' + '.join(names), 'ids': ' + '.join(ids), 'accuracy': float(accuracy[1]),
               'bbox': box(data['bbox']) if 'bbox' in data else system['bbox'], 'grid': needs_grid, 'shift': shift(pipeline[1]), 'pipeline': native(pipeline[1])}


SEA = re.compile(r'offshore|Strait|cone shelf|Bali Sea')
LAND = re.compile(r'onshore|mainland|^(?!.*(offshore|Strait|cone shelf|Bali Sea))')


def identity(system):
    return {'name': 'Already WGS 84', 'ids': '', 'accuracy': 0.0, 'bbox': system['bbox'], 'grid': False,
            'shift': [0.0] * 7, 'pipeline': None}


def inside(bbox, lon, lat):
    west, south, east, north = bbox
    across = west <= lon <= east if west <= east else lon >= west or lon <= east
    return across and south <= lat <= north


def wrap(lon):
    return (lon + 180) % 360 - 180


def cells(bbox):
    west, south, east, north = bbox
    width = (east - west) % 360 or 360
    return [(wrap(west + width * (i + 0.5) / 24), south + (north - south) * (j + 0.5) / 24)
            for i in range(24) for j in range(24)]


def cover(system, found):
    """
    The fewest operations that reach the area of use, the more accurate first where several reach as far; then finer
    ones for large parts of it.
    """
    open_cells = set(cells(system['bbox']))
    total, chosen, rest = len(open_cells), [], list(found)
    while rest and open_cells:
        gain = lambda op: sum(inside(op['bbox'], *cell) for cell in open_cells)
        widest = max(gain(op) for op in rest)
        if widest < 0.02 * total:
            break
        near = [op for op in rest if gain(op) >= 0.9 * widest]
        best = min(near, key=lambda op: op['accuracy'])
        chosen.append(best)
        rest.remove(best)
        open_cells = {cell for cell in open_cells if not inside(best['bbox'], *cell)}
    everywhere = max((op['accuracy'] for op in chosen), default=0)
    finer = [op for op in rest if op['accuracy'] < 0.7 * everywhere and reached(system, op) >= 0.1]
    chosen += sorted(finer, key=lambda op: -reached(system, op))[:FINER]
    return sorted(chosen, key=lambda op: op['accuracy']), 1 - len(open_cells) / total


def reached(system, op):
    spots = cells(system['bbox'])
    return sum(inside(op['bbox'], *spot) for spot in spots) / len(spots)


def overlap(a, b):
    """The part of box a inside box b; a box over the date line is kept whole."""
    if a[0] > a[2] or b[0] > b[2]:
        return a
    cut = [max(a[0], b[0]), max(a[1], b[1]), min(a[2], b[2]), min(a[3], b[3])]
    return cut if cut[0] < cut[2] and cut[1] < cut[3] else a


def places(bbox):
    west, south, east, north = bbox
    south, north = max(south, -89.9), min(north, 89.9)
    width = (east - west) % 360 or 360
    # A hundredth inside, so that a corner on the date line or on a pole stays one place.
    return [(round(wrap(west + width * i), 6), round(south + (north - south) * j, 6))
            for i, j in ((0.5, 0.5), (0.01, 0.01), (0.01, 0.99), (0.99, 0.01), (0.99, 0.99))]


def cct(pipeline, points, *flags):
    text = ''.join(f'{first!r} {second!r} 0 0\n' for first, second in points)
    lines = run(['cct', *flags, '-d', '10', *pipeline.split()], text).splitlines()
    out = []
    for line in lines:
        words = line.split()
        numbers = [float(w) if re.match(r'^-?[\d.]+(e[+-]?\d+)?$', w) else math.inf for w in words[:2]]
        out.append(numbers if len(numbers) == 2 else [math.inf, math.inf])
    return out


def cs2cs(system, points):
    """Metres between PROJ's own choice of operation (with the grids Debian ships) and the given lon, lat."""
    turned = {'en': (0, 1), 'ne': (1, 0), 'ws': (0, 1)}[system['axis']]
    text = ''.join(f"{p['xy'][turned[0]]!r} {p['xy'][turned[1]]!r}\n" for p in points)
    lines = run(['cs2cs', '-d', '10', f"EPSG:{system['code']}", 'EPSG:4326'], text).splitlines()
    out = []
    for line, p in zip(lines, points):
        words = line.split()
        try:
            lat, lon = float(words[0]), float(words[1])
        except ValueError:
            out.append(None)
            continue
        east = wrap(lon - p['back'][0]) * 111320 * math.cos(math.radians(lat))
        out.append(round(math.hypot(east, (lat - p['back'][1]) * 111320), 3))
    return out


def examine(system):
    code = system['code']
    text, system['axis'] = described(code)
    if system['axis'] not in ('en', 'ne', 'ws'):
        return {**system, 'refused': 'axes'}
    system['def'] = definition(code, text)
    found = [identity(system)] if code == 4326 else list(operations(system))
    usable = [op for op in found if not op['grid'] and op['shift']]
    if code == 4326:
        usable[0]['pipeline'] = '+proj=pipeline +step +proj=unitconvert +xy_in=deg +xy_out=deg'
    if not usable:
        return {**system, 'refused': 'grid' if any(op['grid'] for op in found) else 'operation'}
    chosen, reach = cover(system, usable)
    # Places that no operation reaches are refused one by one when somebody asks for them.
    if reach < 0.25:
        return {**system, 'refused': 'grid' if any(op['grid'] for op in found) else 'operation'}
    grids = [op['accuracy'] for op in found if op['grid'] and op['accuracy'] < min(o['accuracy'] for o in chosen)]
    system['grid'] = min(grids) if grids else None
    system['ops'] = chosen
    system['points'] = []
    for index, op in enumerate(chosen):
        spots = places(overlap(op['bbox'], system['bbox']) if len(chosen) > 1 else system['bbox'])
        digits = 9 if system['def'].startswith('longlat') else 4
        projected = [[round(v, digits) if math.isfinite(v) else v for v in xy] for xy in cct(op['pipeline'], spots, '-I')]
        kept = [(spot, xy) for spot, xy in zip(spots, projected) if all(map(math.isfinite, xy))]
        returned = cct(op['pipeline'], [xy for _, xy in kept])
        for ((lon, lat), xy), back in zip(kept, returned):
            # Heights are dropped on the way, so there and back may differ by centimetres; both are PROJ's answers.
            system['points'].append({'op': index, 'lon': lon, 'lat': lat, 'xy': xy, 'back': [round(v, 9) for v in back]})
    if not system['points']:
        return {**system, 'refused': 'projection'}
    for point, metres in zip(system['points'], cs2cs(system, system['points'])):
        # Outside the operation's own area PROJ is free to take any other, or none.
        point['cs2cs'] = metres if inside(chosen[point['op']]['bbox'], point['lon'], point['lat']) else None
    return system


def number(value):
    return f'{value:.10g}'


def write_table(offered, refused, provenance):
    listed, areas, rows = {}, {}, []
    for s in offered:
        keys = []
        for op in s['ops']:
            # One operation alone is used over the whole area of the system; several are chosen between by their own areas.
            own = ','.join(map(number, op['bbox'])) if len(s['ops']) > 1 else ''
            moved = ','.join(map(number, op['shift'])) if any(op['shift']) else ''
            whole = '|'.join([op['name'], op['ids'], number(op['accuracy']), moved, own])
            keys.append(listed.setdefault(whole, len(listed)))
        area = areas.setdefault(f"{s['area']}|{','.join(map(number, s['bbox']))}", len(areas))
        rows.append('|'.join([str(s['code']), s['name'], str(area), s['axis'], s['def'],
                              ','.join(map(str, keys)), '' if s['grid'] is None else number(s['grid'])]))
    table = {'provenance': provenance, 'areas': list(areas), 'operations': list(listed), 'systems': rows,
             'refused': [f"{s['code']}|{s['name']}|{s['refused']}" for s in refused]}
    (ROOT / 'shared/geodesy/crs-table.json').write_text(json.dumps(table, indent=2, ensure_ascii=False) + '\n')


def write_points(offered, provenance):
    lines = []
    for s in offered:
        for p in s['points']:
            row = [s['code'], p['op'], p['lon'], p['lat'], *p['xy'], *p['back'], p['cs2cs']]
            lines.append(json.dumps(row, separators=(',', ':')))
    text = '{\n"provenance": ' + json.dumps(provenance, indent=2) + ',\n"columns": ' \
        + json.dumps(['code', 'operation', 'lon', 'lat', 'x', 'y', 'lon_of_xy', 'lat_of_xy', 'cs2cs_difference_m']) + ',\n"points": [\n' \
        + ',\n'.join(lines) + '\n]\n}\n'
    (HERE / 'crs-points.json').write_text(text)


def main():
    with concurrent.futures.ThreadPoolExecutor(6) as pool:
        results = list(pool.map(examine, systems()))
    candidates = [s for s in results if 'refused' not in s]
    answer = subprocess.run(['node', str(HERE / 'crs-agreement.mjs')], input=json.dumps(candidates), text=True,
                            capture_output=True, check=True).stdout
    worst = {int(code): metres for code, metres in json.loads(answer).items()}
    for s in candidates:
        metres = worst[s['code']]
        if metres is None or metres > 0.01:
            print(f"{s['code']} {s['name']}: proj4js differs by {metres} m", file=sys.stderr)
            s['refused'] = 'projection'
    offered = [s for s in results if 'refused' not in s]
    refused = [s for s in results if 'refused' in s]
    provenance = {'tool': 'PROJ (projinfo, cct, cs2cs) with the EPSG registry ' +
                  sqlite3.connect(DATABASE).execute("select value from metadata where key='EPSG.VERSION'").fetchone()[0],
                  'version': re.search(r'Rel\. ([\d.]+)', subprocess.run(['proj'], capture_output=True, text=True).stderr)[1],
                  'script': 'tests/reference/crs-table.py',
                  'scriptSha256': hashlib.sha256(pathlib.Path(__file__).read_bytes()).hexdigest()}
    write_table(offered, refused, provenance)
    write_points(offered, provenance)
    print(f'{len(offered)} offered, {len(refused)} refused', file=sys.stderr)
    for reason in sorted({s['refused'] for s in refused}):
        print(reason, [s['code'] for s in refused if s['refused'] == reason], file=sys.stderr)


main()
