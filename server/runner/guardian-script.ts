import { MARK_NAME } from './adapter-environment.ts';

/**
 * A shell program that ends what is left when Tallyroot itself has ended, in whatever way. Its standard input
 * is a pipe whose other end only Tallyroot holds: end of file means that Tallyroot is gone. `$1` begins the
 * marks of all adapters of this Tallyroot, `$2` is its scratch folder.
 */
export const GUARDIAN_SCRIPT = `
trap '' HUP INT TERM QUIT
groups=' '
while read -r verb group; do
  case $verb in
    add) groups="$groups$group " ;;
    drop) groups="\${groups%% $group *} \${groups#* $group }" ;;
  esac
done
for round in 1 2 3; do
  for group in $groups; do kill -9 "-$group"; done
  for file in /proc/[0-9]*/environ; do
    if grep -qaF "${MARK_NAME}=$1." "$file"; then
      pid=\${file#/proc/}
      kill -9 "\${pid%/environ}"
    fi
  done
done
rm -rf "$2"
`;
