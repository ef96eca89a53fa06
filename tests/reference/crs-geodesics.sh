#!/bin/sh
# Makes crs-geodesics.json: distances and directions on WGS 84 by PROJ's own `geod` (Karney's algorithm in C).
# Run: sh tests/reference/crs-geodesics.sh   (Debian package proj-bin)
here=$(dirname "$0")
version=$(proj 2>&1 | sed -n 's/.*Rel\. \([0-9.]*\).*/\1/p' | head -n 1)
hash=$(sha256sum "$here/crs-geodesics.sh" | cut -d ' ' -f 1)
pairs() {
  # lat lon of both ends: a metre, a site, a region, across the date line, over the pole, nearly opposite, one place
  cat <<'PAIRS'
-38.4 -21.2 -38.40000898 -21.2
-38.4 -21.2 -38.4012 -21.1975
-38.4172 -21.184 -38.2 -20.9
51.5 -0.1275 51.6 -0.3
-17.5 179.9 -17.6 -179.8
89.9 10 89.9 -170
0 0 0.5 179.5
60 25 60 25
-37.951033417 144.424867889 -37.652821139 143.926495528
PAIRS
}
{
  printf '{\n"provenance": {"tool": "PROJ geod", "version": "%s", "script": "tests/reference/crs-geodesics.sh", "scriptSha256": "%s"},\n' "$version" "$hash"
  printf '"columns": ["lat1", "lon1", "lat2", "lon2", "bearing", "bearing_back", "distance_m"],\n"lines": [\n'
  pairs | while read -r a b c d; do
    printf '%s %s %s %s\n' "$a" "$b" "$c" "$d" | geod +ellps=WGS84 -I -f %.10f -F %.6f | tr '\t' ' ' |
      awk -v row="$a $b $c $d" '{ gsub(" ", ",", row); printf "[%s,%s,%s,%s]\n", row, $1, $2, $3 }'
  done | sed '$!s/$/,/'
  printf ']\n}\n'
} >"$here/crs-geodesics.json"
