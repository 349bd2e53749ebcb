#!/bin/sh
# Makes a study of maximum speeds, shows how far it is, and writes its results as a table.
#
#   sh openapi/examples/study.sh REQUEST [RESULTS]
#
# REQUEST is the JSON body of POST /v1/studies; RESULTS is the file that the table is written to, study.csv when it is not
# given. The id of the study is printed at the end. When the command is interrupted the study goes on: ask for it by its
# id, or cancel it with curl -X DELETE.
#
#   WASHLIMIT_URL   where the service listens, http://127.0.0.1:8080 when it is not set
#   WASHLIMIT_KEY   a key with the role write, where the service asks for one
#
# The status is 0 when the study has succeeded, 1 when it has not, and 2 when the command is wrong. It needs curl and awk.
set -eu

usage() {
  awk 'NR > 1 { if (!/^#/) exit; sub(/^# ?/, ""); print }' "$0"
}

case ${1-} in
  -h | --help) usage && exit 0 ;;
  '') usage >&2 && exit 2 ;;
esac

request=$1
results=${2-study.csv}
[ -r "$request" ] || { echo "$request cannot be read" >&2 && exit 2; }
service=${WASHLIMIT_URL-http://127.0.0.1:8080}

folder=$(mktemp -d)
trap 'rm -rf "$folder"' EXIT
trap 'exit 1' HUP INT TERM

# what stands in a file of its own is not seen in the list of processes: a key least of all
settings() {
  if [ -n "${WASHLIMIT_KEY-}" ]; then printf 'header = "authorization: Bearer %s"\n' "$WASHLIMIT_KEY"; fi
}

# the answer is left in the file answer
ask() {
  status=$(settings | curl --config - --silent --show-error --output "$folder/answer" --write-out '%{http_code}' "$@") || {
    echo "the service at $service could not be asked" >&2
    exit 1
  }
  case $status in
    2??) ;;
    *)
      echo "refused with status $status:" >&2
      cat "$folder/answer" >&2
      echo >&2
      exit 1
      ;;
  esac
}

# the value of the first field of that name in the answer
value() {
  awk -v name="\"$1\":" '
    { text = text $0 }
    END {
      at = index(text, name)
      if (at == 0) exit
      rest = substr(text, at + length(name))
      if (substr(rest, 1, 1) == "\"") { rest = substr(rest, 2); sub(/".*/, "", rest) } else sub(/[,}].*/, "", rest)
      print rest
    }' "$folder/answer"
}

bar() {
  [ -t 2 ] || return 0
  awk -v ratio="$(value progress_ratio)" -v left="$(value remaining_s)" -v cells="$(value cells_done) of $(value cells_total) cells" '
    BEGIN {
      width = 40
      done = int(ratio * width)
      for (i = 0; i < width; i++) line = line (i < done ? "#" : ".")
      time = left == "" ? "" : sprintf(", %d s left", left + 0.5)
      printf "\r[%s] %3d %%  %s%s   ", line, ratio * 100, cells, time
    }' >&2
}

ask --request POST --header 'content-type: application/json' --data @"$request" "$service/v1/studies"
study=$(value id)

while :; do
  ask "$service/v1/studies/$study"
  bar
  case $(value state) in
    queued | running) sleep 1 ;;
    succeeded) break ;;
    *)
      [ -t 2 ] && echo >&2
      echo "the study $study has not succeeded: it is $(value state)" >&2
      exit 1
      ;;
  esac
done
[ -t 2 ] && echo >&2

ask --header 'accept: text/csv' "$service/v1/studies/$study/results"
cp "$folder/answer" "$results"
echo "$study"
