#!/bin/sh
# From segments to published limits: imports a waterway, studies it, draws limits, publishes them, and has them verified.
#
#   sh openapi/examples/limits.sh [FOLDER]
#
# Everything is written to FOLDER, limits when it is not given: study.csv with the results, plan.json, plan.geojson,
# plan.csv, publication.json, record.json with everything the plan rests on, evidence.html to print, notice.json and
# verification.json. The requests are the examples beside this script: copy and change them for a waterway of your own.
#
#   WASHLIMIT_URL   where the service listens, http://127.0.0.1:8080 when it is not set
#   WASHLIMIT_KEY   a key with the role publish, where the service asks for one
#   NUMBER          the number to publish under, one of its own each time; made from the time when it is not set
#
# Prints `study=… plan=…`, which a shell can evaluate. It needs curl and awk.
set -eu

case ${1-} in
  -h | --help) awk 'NR > 1 { if (!/^#/) exit; sub(/^# ?/, ""); print }' "$0" && exit 0 ;;
esac

examples=$(dirname "$0")
folder=${1-limits}
service=${WASHLIMIT_URL-http://127.0.0.1:8080}
number=${NUMBER-HN-$(date -u +%Y%m%d-%H%M%S)}
mkdir -p "$folder"

# a key stands in no argument, which others could see
settings() {
  if [ -n "${WASHLIMIT_KEY-}" ]; then printf 'header = "authorization: Bearer %s"\n' "$WASHLIMIT_KEY"; fi
}

ask() {
  settings | curl --config - --silent --show-error --fail-with-body "$@" || {
    echo "refused: curl $*" >&2
    exit 1
  }
}

field() {
  awk -v name="\"$1\":\"" '
    { at = index($0, name); if (at) { rest = substr($0, at + length(name)); sub(/".*/, "", rest); print rest; exit } }' "$2"
}

ask --output "$folder/import.json" --header 'content-type: application/geo+json' \
  --data @"$examples/harrowmere-navigation.geojson" "$service/v1/segments/import"

study=$(sh "$examples/study.sh" "$examples/createStudy.request.json" "$folder/study.csv")

sed "s/\"study_id\": \"[^\"]*\"/\"study_id\": \"$study\"/" "$examples/createLimitPlan.request.json" \
  >"$folder/plan.request.json"
ask --output "$folder/plan.json" --header 'content-type: application/json' --data @"$folder/plan.request.json" \
  "$service/v1/limit-plans"
plan=$(field id "$folder/plan.json")

sed "s/\"number\": \"[^\"]*\"/\"number\": \"$number\"/" "$examples/publishLimitPlan.request.json" \
  >"$folder/publication.request.json"
ask --output "$folder/publication.json" --header 'content-type: application/json' \
  --data @"$folder/publication.request.json" "$service/v1/limit-plans/$plan/publish"

ask --output "$folder/plan.json" "$service/v1/limit-plans/$plan"
ask --output "$folder/plan.geojson" "$service/v1/limit-plans/$plan?format=geojson"
ask --output "$folder/plan.csv" "$service/v1/limit-plans/$plan?format=csv"
ask --output "$folder/record.json" "$service/v1/limit-plans/$plan/record"
ask --output "$folder/evidence.html" "$service/v1/limit-plans/$plan/evidence"
ask --output "$folder/notice.json" "$service/v1/limit-plans/$plan/notice"

ask --output "$folder/verification.json" --request POST "$service/v1/limit-plans/$plan/verify"
verdict=
while [ -z "$verdict" ]; do
  sleep 1
  ask --output "$folder/verification.json" "$service/v1/limit-plans/$plan/verify"
  verdict=$(field verdict "$folder/verification.json")
  case $(field state "$folder/verification.json") in
    failed | cancelled) echo "the verification has not succeeded" >&2 && exit 1 ;;
  esac
done
[ "$verdict" = reproduced ] || { echo "the plan is not reproduced: $verdict" >&2 && exit 1; }

echo "study=$study plan=$plan"
