#!/usr/bin/env bash
# Runs the terminal bench in tmux and checks that it starts, resizes, ends in every way and leaves the terminal as it was.
# Usage: tools/bench-terminal-check.sh PROGRAM CAPTURE.csv      PROGRAM is the built scopereader. Needs tmux.
# Prints a line a check and "N passed, N failed"; the status is 1 where one failed. WAIT is the longest wait, s (30).
set -u
program=$(realpath "${1:?the built program}") capture=$(realpath "${2:?a capture}")
wait_for=${WAIT:-30}
work=$(mktemp -d)
export TMUX_TMPDIR=$work HOME=$work/home
mkdir -p "$HOME"
socket=0
mux() { tmux -L "check$socket" -f /dev/null "$@"; }
pane() { mux display-message -p -t t "$1"; }
trap 'mux kill-server 2>/dev/null; sleep 1; rm -rf "$work"' EXIT
passed=0 failed=0

check() { # NAME FOUND EXPECTED
  if [ "$2" = "$3" ]; then passed=$((passed + 1)); echo "pass  $1"
  else failed=$((failed + 1)); echo "FAIL  $1: expected \"$3\", found \"$2\""; fi
}

shows() { # REGEX: waits until the screen shows it
  local n=$((wait_for * 10))
  while ((n-- > 0)); do mux capture-pane -p -t t | grep -qE "$1" && { echo yes; return; }; sleep 0.1; done
  echo no
}

state() { echo "alternate=$(pane '#{alternate_on}') mouse=$(pane '#{mouse_any_flag}') cursor=$(pane '#{cursor_flag}') paste=$(pane '#{?bracket_paste_flag,1,0}')"; }

begin() { # ENVIRONMENT…: a fresh terminal with the bench in it
  mux kill-server 2>/dev/null
  # A socket of its own: a server that is still going down would take the next one's sessions with it.
  socket=$((socket + 1))
  rm -f "$work"/{status,before,after,pid}
  mux new-session -d -s t -x 80 -y 24 "env PS1= bash --noprofile --norc"
  mux set-option -g remain-on-exit on
  found=$(state)
  mux send-keys -t t "stty -a > $work/before; env $* bash -c 'echo \$\$ > $work/pid; exec $program $capture'; echo \$? > $work/status; stty -a > $work/after; echo back" Enter
}

started() { check "$1: starts and measures" "$(shows '1 readings [1-9]')" yes; }

ended() { # NAME STATUS
  local n=$((wait_for * 10))
  while [ ! -s "$work/after" ] && ((n-- > 0)); do sleep 0.1; done
  sleep 0.3
  check "$1: exit status" "$(cat "$work/status" 2>/dev/null)" "$2"
  check "$1: screen, mouse, cursor as before" "$(state)" "$found"
  check "$1: line settings as before" "$(cmp -s "$work/before" "$work/after" && echo same || echo different)" same
}

begin TERM=tmux-256color; started q
check "q: takes the alternate screen" "$(pane '#{alternate_on}')" 1
plain=$(mux capture-pane -p -t t)
mux send-keys -t t q; ended q 0

begin TERM=tmux-256color; started Ctrl-Q; mux send-keys -t t C-q; ended Ctrl-Q 0
begin TERM=tmux-256color; started Ctrl-C; mux send-keys -t t C-c; ended Ctrl-C 130
for signal in INT:130 TERM:143 HUP:129; do
  name=SIG${signal%:*}
  begin TERM=tmux-256color; started "$name"; kill -"${signal%:*}" "$(cat "$work/pid")"; ended "$name" "${signal#*:}"
done

begin TERM=tmux-256color; started resizing
for size in "120 40" "40 12" "20 5" "200 60" "80 24"; do
  set -- $size
  mux resize-window -t t -x "$1" -y "$2"; sleep 1
done
check "resizing: back at 80×24 the screen is what it was" "$(n=100; while ((n-- > 0)) && [ "$(mux capture-pane -p -t t)" != "$plain" ]; do sleep 0.1; done; mux capture-pane -p -t t)" "$plain"
mux send-keys -t t F1; check "resizing: keys still work" "$(shows 'This screen, explained')" yes
mux send-keys -t t q; ended resizing 0

# A person's own settings for the terminal library, as unlike the bench's as they can be. (Nested, as the library reads them:
# one key of the older flat kind makes it skip the whole file.)
mkdir -p "$HOME/.tui"
cat > "$HOME/.tui/config.json" <<'JSON'
{ "Application": { "AppModel": "Inline", "ForceDriver": "dotnet", "IsMouseDisabled": true, "DefaultKeyBindings": { "Quit": { "All": ["+"] } } },
  "Driver": { "Force16Colors": true, "SizeDetection": "AnsiQuery" }, "Theme": "Light",
  "Schemes": { "Base": { "Normal": { "Foreground": "Red", "Background": "Blue" } } },
  "View": { "DefaultKeyBindings": { "Quit": { "All": ["CursorDown"] } } } }
JSON
begin TERM=tmux-256color; shows '1 readings [1-9]' >/dev/null
colours=$(mux capture-pane -e -p -t t)
check "settings of a person's own: same screen" "$(mux capture-pane -p -t t)" "$plain"
check "settings of a person's own: the mouse still works" "$(pane '#{mouse_any_flag}')" 1
mux send-keys -t t +; sleep 1
check "settings of a person's own: + does not quit" "$(pane '#{alternate_on}')" 1
mux send-keys -t t q
rm -rf "$HOME/.tui"
begin TERM=tmux-256color; shows '1 readings [1-9]' >/dev/null
check "settings of a person's own: same colours" "$(mux capture-pane -e -p -t t | cksum)" "$(printf '%s\n' "$colours" | cksum)"
mux send-keys -t t q

begin TERM=tmux-256color NO_COLOR=1; started NO_COLOR
check "NO_COLOR: no colour is sent" "$(mux capture-pane -e -p -t t | grep -cE $'\e\\[([0-9;]*;)?(3[0-8]|4[0-8]|9[0-7])')" 0
mux send-keys -t t q; ended NO_COLOR 0

check "no terminal: status" "$("$program" "$capture" </dev/null >"$work/out" 2>"$work/err"; echo $?)" 64
check "no terminal: one line that names the other way" "$(wc -l <"$work/err") $(grep -c 'scopereader measure' "$work/err") $(wc -c <"$work/out")" "1 1 0"
begin TERM=dumb
check "TERM=dumb: says so" "$(shows 'TERM is dumb')" yes
ended TERM=dumb 64

echo "$passed passed, $failed failed"
[ "$failed" -eq 0 ]
