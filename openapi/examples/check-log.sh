#!/bin/sh
# Checks a log of AIS position reports: who was faster than advisable, where and for how long.
#
#   sh openapi/examples/check-log.sh LOG [NAME=VALUE ...]
#
# LOG is CSV with a header line, or NDJSON when its name ends in .ndjson or .jsonl; either may be compressed, with .gz at
# the end. Each NAME=VALUE is a parameter of the query: waterway, water_level_m, current_mps, tolerance_kn, position,
# min_event_reports, max_gap_s, tow_length_m, tow_beam_m, tow_draught_m.
#
#   WASHLIMIT_URL   where the service listens, http://127.0.0.1:8080 when it is not set
#   WASHLIMIT_KEY   a key with the role read, where the service asks for one
#
# Prints a table of the exceedances and a line for the whole log. The status is 0 when the log was checked to its end,
# whatever was found in it, 1 when it was not, and 2 when the command is wrong. It needs curl and awk.
set -eu

usage() {
  awk 'NR > 1 { if (!/^#/) exit; sub(/^# ?/, ""); print }' "$0"
}

case ${1-} in
  -h | --help) usage && exit 0 ;;
  '') usage >&2 && exit 2 ;;
esac

log=$1
shift
[ -r "$log" ] || { echo "$log cannot be read" >&2 && exit 2; }

kind=text/csv
case $log in *.ndjson | *.ndjson.gz | *.jsonl | *.jsonl.gz) kind=application/x-ndjson ;; esac

# a name with blanks or signs in it is encoded, so that the address stays one
encoded() {
  printf '%s' "$1" | od -An -v -tx1 | tr -d '\n' | awk '{ gsub(/ /, "%"); printf "%s", $0 }'
}

query='detail=events'
for parameter in "$@"; do
  case $parameter in
    *=*) query="$query&${parameter%%=*}=$(encoded "${parameter#*=}")" ;;
    *) echo "$parameter is not NAME=VALUE" >&2 && exit 2 ;;
  esac
done

folder=$(mktemp -d)
trap 'rm -rf "$folder"' EXIT
trap 'exit 1' HUP INT TERM

# what stands in a file of its own is not seen in the list of processes: a key least of all
settings() {
  printf 'header = "content-type: %s"\n' "$kind"
  printf 'header = "accept: application/x-ndjson"\n'
  case $log in *.gz) printf 'header = "content-encoding: gzip"\n' ;; esac
  if [ -n "${WASHLIMIT_KEY-}" ]; then printf 'header = "authorization: Bearer %s"\n' "$WASHLIMIT_KEY"; fi
}

# sent from the file as it is read, so that a log may be larger than memory
status=$(
  settings | curl --config - --silent --show-error --request POST --upload-file "$log" \
    --output "$folder/answer" --write-out '%{http_code}' \
    "${WASHLIMIT_URL-http://127.0.0.1:8080}/v1/passages/check?$query"
) || { echo "incomplete: the service could not be asked, or the answer broke off" >&2 && exit 1; }

if [ "$status" != 200 ]; then
  echo "refused with status $status:" >&2
  cat "$folder/answer" >&2
  echo >&2
  exit 1
fi

# events as rows of cells, and the summary as two lines of text
awk '
# the value of a field of a flat JSON object, or of the first field of that name
function value(name,    at, rest, i, c, text) {
  at = index($0, "\"" name "\":")
  if (at == 0) return "-"
  rest = substr($0, at + length(name) + 3)
  if (substr(rest, 1, 1) != "\"") {
    match(rest, /[,}]/)
    rest = substr(rest, 1, RSTART - 1)
    return rest == "null" ? "-" : rest
  }
  for (i = 2; (c = substr(rest, i, 1)) != "\"" && c != ""; i++) {
    if (c == "\\") {
      c = substr(rest, ++i, 1)
      if (c == "u") i += 4
      if (c !~ /["\\\/]/) c = "?"
    }
    text = text c
  }
  return text
}

function number(name, format,    figure) {
  figure = value(name)
  return figure == "-" ? figure : sprintf(format, figure)
}

function clock(time) {
  sub(/T/, " ", time)
  sub(/Z$/, "", time)
  return time
}

# counts by status that are not zero
function counts(    rest, i, n, pairs, pair, text) {
  rest = substr($0, index($0, "\"by_status\":{") + 13)
  rest = substr(rest, 1, index(rest, "}") - 1)
  n = split(rest, pairs, ",")
  for (i = 1; i <= n; i++) {
    split(pairs[i], pair, ":")
    gsub(/"/, "", pair[1])
    if (pair[2] > 0) text = text (text == "" ? "" : ", ") pair[2] " " pair[1]
  }
  return text
}

BEGIN { OFS = "\t" }

/^\{"type":"event"/ {
  print clock(value("start")), value("mmsi") == "-" ? value("eni") : value("mmsi"), value("vessel_name"), \
    value("segment_id"), value("direction"), sprintf("%.1f", value("duration_s") / 60), value("reports"), \
    number("peak_over_ground_kn", "%.1f"), number("peak_max_over_ground_kn", "%.1f"), \
    number("peak_excess_kn", "%.1f"), value("certainty"), value("governing_criterion"), \
    value("first_line") "-" value("last_line")
}

/^\{"type":"summary"/ && /"complete":true/ {
  isComplete = 1
  text = sprintf("%s rows from %s to %s: %s.", value("read"), clock(value("from")), clock(value("to")), counts())
  print text > summary
  text = sprintf("%s vessels made %s passages; exceedances: %s certain, %s depending on a draught that is not known.", \
    value("vessels"), value("passages"), value("certain"), value("depends_on_draught"))
  print text > summary
}

END { if (!isComplete) exit 1 }
' summary="$folder/summary" "$folder/answer" >"$folder/events" || isComplete=no

# in the order of time, each column as wide as its widest cell, figures to the right
sort "$folder/events" | awk -F '\t' -v head='from (UTC)|mmsi|name|segment|direction|min|reports|peak kn|advised kn|over kn|certainty|criterion|lines' '
function keep(row, cells, n,    i) {
  for (i = 1; i <= n; i++) {
    table[row, i] = cells[i]
    if (length(cells[i]) > width[i]) width[i] = length(cells[i])
  }
}

BEGIN { columns = split(head, cells, "|"); keep(0, cells, columns) }

{ split($0, cells, "\t"); keep(NR, cells, columns) }

END {
  for (row = 0; row <= NR && NR > 0; row++) {
    line = ""
    for (i = 1; i <= columns; i++) {
      side = i >= 6 && i <= 10 ? "" : "-"
      line = line (i > 1 ? "  " : "") sprintf("%" side width[i] "s", table[row, i])
    }
    sub(/ +$/, "", line)
    print line
  }
  if (NR > 0) print ""
}
'

if [ "${isComplete-}" = no ]; then
  echo "incomplete: the answer ends without a summary" >&2
  exit 1
fi
cat "$folder/summary"
