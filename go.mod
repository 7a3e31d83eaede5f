module gloamwright

go 1.26
