#!/usr/bin/env bash
# Re-makes spectra/observers and spectra/illuminants from Debian's package colord-data (numbers only).
# Run on Debian with apt: bash spectra/make-published-spectra.sh
# The tables keep the step and the digits of the package. The program brings them to 1 nm itself (Sprague, CIE 167).
set -euo pipefail
here=$(cd "$(dirname "$0")" && pwd)
work=$(mktemp -d); trap 'rm -rf "$work"' EXIT
(cd "$work" && apt-get download colord-data >/dev/null 2>&1 && dpkg -x colord-data_*.deb data)
version=$(cd "$work" && ls colord-data_*.deb | cut -d_ -f2)
from="$work/data/usr/share/colord"
mkdir -p "$here/observers" "$here/illuminants"

# table FILE COLUMNS SCALE DIGITS: the rows of a CGATS-like file turned into columns, 360 to 830 nm, below a CSV header.
table() {
  awk -v columns="$2" -v scale="$3" '
    { sub(/\r$/, "") }
    /^SPECTRAL_START_NM/ { start = $2 } /^SPECTRAL_END_NM/ { end = $2 } /^SPECTRAL_BANDS/ { bands = $2 }
    /^END_DATA *$/ { data = 0 }
    data && NF > 1 { rows++; for (i = 1; i <= NF; i++) value[rows, i] = $i }
    /^BEGIN_DATA *$/ { data = 1 }
    END {
      print "wavelength_nm," columns
      for (i = 1; i <= bands; i++) {
        nm = start + (i - 1) * (end - start) / (bands - 1)
        if (nm < 360 || nm > 830) continue
        line = nm
        for (r = 1; r <= rows; r++) line = line "," (scale == 1 ? value[r, i] : sprintf("%.6g", value[r, i] * scale))
        print line
      }
    }' "$1"
}

# header QUANTITY UNIT STEP SOURCE: what every spectrum file of the project begins with.
header() {
  printf '# quantity: %s\n# unit: %s\n# step: %s\n# source: %s\n' "$1" "$2" "$3" "$4"
  printf '# licence: published facts; the numbers are those of the CIE tables named above\n'
  printf '# obtained: numbers of the Debian package colord-data %s by spectra/make-published-spectra.sh\n' "$version"
}

{ header "colour-matching functions, CIE 1931 standard observer, 2 degrees" 1 "5 nm" "CIE 15:2018 and CIE 018:2019, ISO/CIE 11664-1:2019"
  table "$from/cmf/CIE1931-2deg-XYZ.cmf" x_bar,y_bar,z_bar 1; } > "$here/observers/cie-1931-2-degree.csv"
{ header "colour-matching functions, CIE 1964 standard observer, 10 degrees" 1 "5 nm" "CIE 15:2018 and CIE 018:2019, ISO/CIE 11664-1:2019"
  table "$from/cmf/CIE1964-10deg-XYZ.cmf" x_bar,y_bar,z_bar 1; } > "$here/observers/cie-1964-10-degree.csv"
{ header "relative spectral power, CIE standard illuminant A" "relative, 100 at 560 nm" "1 nm" "CIE 15:2018 Table T.1, ISO/CIE 11664-2:2022"
  table "$from/illuminant/CIE-A.sp" power_per_nm 100; } > "$here/illuminants/a.csv"
{ header "relative spectral power, CIE standard illuminant D65" "relative, 100 at 560 nm" "5 nm" "CIE 15:2018 Table T.1, ISO/CIE 11664-2:2022"
  table "$from/illuminant/CIE-D65.sp" power_per_nm 100; } > "$here/illuminants/d65.csv"
{ header "components S0, S1, S2 of daylight" "relative" "5 nm" "CIE 15:2018 Table T.2"
  table "$from/ref/CIE-1986-daylight-SPD.cmf" s0,s1,s2 1; } > "$here/illuminants/daylight-components.csv"
# E is its own definition; the package stops at 380 and 780 nm.
{ header "relative spectral power, equal-energy illuminant E" "relative, 100 at every wavelength" "5 nm" "CIE 15:2018, definition" | sed 's/^# obtained: .*/# obtained: written from its definition by spectra\/make-published-spectra.sh/'
  echo wavelength_nm,power_per_nm; seq 360 5 830 | sed 's/$/,100/'; } > "$here/illuminants/e.csv"
# D50 of the package is rounded to three digits: it is made of S0 + M1 S1 + M2 S2 with the M1, M2 of 5003 K (CIE 15), scaled to 100 at 560 nm.
{ header "relative spectral power, CIE illuminant D50" "relative, 100 at 560 nm" "5 nm" "CIE 15:2018: S0 + M1 S1 + M2 S2 with M1 = -1.039, M2 = 0.363"
  awk -F, '!/^#/ && NR > 1 { if ($1 == "wavelength_nm") print "wavelength_nm,power_per_nm"; else printf "%s,%.3f\n", $1, $2 - 1.039 * $3 + 0.363 * $4 }' \
    "$here/illuminants/daylight-components.csv"; } > "$here/illuminants/d50.csv"
