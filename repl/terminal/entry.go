package terminal

import "strings"

// lineBreak stands for a line break where a block is shown, edited and kept on
// one line.
const lineBreak = "↵"

// joinEntry puts the lines of a statement on one line. What was copied from a
// terminal may hold prompts and replies, which are no part of it.
func joinEntry(lines []string) string {
	var parts []string
	for _, line := range lines {
		line = strings.TrimSpace(strings.TrimPrefix(line, prompt))
		if !strings.HasPrefix(line, strings.TrimSpace(margin)) {
			parts = append(parts, line)
		}
	}
	return strings.TrimSpace(strings.Join(parts, " "+lineBreak+" "))
}

// splitEntry takes it apart again.
func splitEntry(entry string) []string {
	if !strings.Contains(entry, lineBreak) {
		return []string{entry}
	}
	parts := strings.Split(entry, lineBreak)
	for i, part := range parts {
		parts[i] = strings.TrimSpace(part)
	}
	return parts
}
